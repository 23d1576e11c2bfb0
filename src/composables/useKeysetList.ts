import { type Ref, type ShallowRef, computed, onScopeDispose, ref, shallowRef } from 'vue';

import type { Page } from '#shared/contracts/common.ts';
import type { LoadStatus } from './useLoaded.ts';

export interface KeysetList<Item> {
  /** All pages loaded so far, one after the other. None are left when a load from the first page on fails. */
  items: ShallowRef<readonly Item[]>;
  status: Ref<LoadStatus>;
  failure: ShallowRef<unknown>;
  canLoadMore: Ref<boolean>;
  /** From the first page on. */
  reload: () => Promise<void>;
  loadMore: () => Promise<void>;
}

/** A list that the server gives page by page. A newer request wins over an older one that answers late. */
export function useKeysetList<Item>(
  loadPage: (cursor: string | null, signal: AbortSignal) => Promise<Page<Item>>,
): KeysetList<Item> {
  const items = shallowRef<readonly Item[]>([]);
  const nextCursor = ref<string | null>(null);
  const status = ref<LoadStatus>('loading');
  const failure = shallowRef<unknown>(null);
  let controller = new AbortController();

  async function load(cursor: string | null) {
    controller.abort();
    const own = new AbortController();
    controller = own;
    status.value = 'loading';
    failure.value = null;
    try {
      const page = await loadPage(cursor, own.signal);
      if (own.signal.aborted) return;
      items.value = cursor === null ? page.items : [...items.value, ...page.items];
      nextCursor.value = page.nextCursor;
      status.value = 'ready';
    } catch (error) {
      if (own.signal.aborted) return;
      if (cursor === null) items.value = [];
      failure.value = error;
      status.value = 'failed';
    }
  }

  onScopeDispose(() => controller.abort());
  return {
    items,
    status,
    failure,
    canLoadMore: computed(() => nextCursor.value !== null),
    reload: () => load(null),
    loadMore: () => load(nextCursor.value),
  };
}
