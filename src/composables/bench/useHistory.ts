import { type ComputedRef, type ShallowRef, computed, shallowRef } from 'vue';

export interface HistoryOptions {
  /** Most steps that can be undone; default 200. */
  depth?: number;
  /** Changes with the same key that follow each other this fast are one step [ms]; default 1200. */
  coalesceMs?: number;
  /** The clock [ms]; for tests. */
  now?: () => number;
}

export interface History<State> {
  present: Readonly<ShallowRef<State>>;
  canUndo: ComputedRef<boolean>;
  canRedo: ComputedRef<boolean>;
  /** A change by the person. With a key, a run of changes of the same thing is undone as one. */
  commit: (next: State, key?: string) => void;
  undo: () => void;
  redo: () => void;
  /** Starts afresh; nothing before it can be undone. */
  reset: (state: State) => void;
}

interface Steps<State> {
  readonly past: readonly State[];
  readonly future: readonly State[];
}

const DEFAULT_DEPTH = 200;
const DEFAULT_COALESCE_MS = 1200;

/** A state with the way back and forth through its changes. States are never changed in place. */
export function useHistory<State>(initial: State, options: HistoryOptions = {}): History<State> {
  const { depth = DEFAULT_DEPTH, coalesceMs = DEFAULT_COALESCE_MS, now = () => performance.now() } = options;
  const present = shallowRef(initial) as ShallowRef<State>;
  const steps = shallowRef<Steps<State>>({ past: [], future: [] });
  let last: { key: string; at: number } | null = null;

  function commit(next: State, key?: string) {
    if (next === present.value) return;
    const at = now();
    const goesOn = key !== undefined && last?.key === key && at - last.at <= coalesceMs;
    if (!goesOn) steps.value = { past: [...steps.value.past, present.value].slice(-depth), future: [] };
    else if (steps.value.future.length > 0) steps.value = { ...steps.value, future: [] };
    last = key === undefined ? null : { key, at };
    present.value = next;
  }

  function undo() {
    const { past, future } = steps.value;
    const before = past.at(-1);
    if (past.length === 0) return;
    steps.value = { past: past.slice(0, -1), future: [present.value, ...future] };
    last = null;
    present.value = before as State;
  }

  function redo() {
    const { past, future } = steps.value;
    if (future.length === 0) return;
    steps.value = { past: [...past, present.value], future: future.slice(1) };
    last = null;
    present.value = future[0] as State;
  }

  function reset(state: State) {
    steps.value = { past: [], future: [] };
    last = null;
    present.value = state;
  }

  return {
    present,
    canUndo: computed(() => steps.value.past.length > 0),
    canRedo: computed(() => steps.value.future.length > 0),
    commit,
    undo,
    redo,
    reset,
  };
}
