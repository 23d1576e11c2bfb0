import { type ShallowRef, type Ref, onScopeDispose, ref, shallowRef } from 'vue';

export type LoadStatus = 'loading' | 'ready' | 'failed';

export interface Loaded<Data> {
  /** What was loaded last; null before the first answer. It stays while it is loaded again. */
  data: ShallowRef<Data | null>;
  status: Ref<LoadStatus>;
  /** Why the last load failed; null when it did not. */
  failure: ShallowRef<unknown>;
  reload: () => Promise<void>;
}

/** Loads something and keeps its three states apart. A newer load wins over an older one that answers late. */
export function useLoaded<Data>(load: (signal: AbortSignal) => Promise<Data>): Loaded<Data> {
  const data = shallowRef<Data | null>(null);
  const status = ref<LoadStatus>('loading');
  const failure = shallowRef<unknown>(null);
  let controller = new AbortController();

  async function reload() {
    controller.abort();
    const own = new AbortController();
    controller = own;
    status.value = 'loading';
    failure.value = null;
    try {
      const answer = await load(own.signal);
      if (own.signal.aborted) return;
      data.value = answer;
      status.value = 'ready';
    } catch (error) {
      if (own.signal.aborted) return;
      failure.value = error;
      status.value = 'failed';
    }
  }

  onScopeDispose(() => controller.abort());
  return { data, status, failure, reload };
}
