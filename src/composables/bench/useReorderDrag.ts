import { type Ref, onScopeDispose, ref } from 'vue';

export interface ReorderDrag {
  /** Place of the row that is being dragged; null when none is. */
  dragged: Ref<number | null>;
  /** To be called by the handle of a row with its place. */
  start: (event: PointerEvent, index: number) => void;
}

/**
 * Drags rows of a list with mouse, pen or finger. Rows are the elements that match `rowSelector` in the list; `move` is told each
 * time the dragged row passes the middle of another.
 */
export function useReorderDrag(input: {
  list: Readonly<Ref<HTMLElement | null>>;
  rowSelector: string;
  move: (from: number, to: number) => void;
}): ReorderDrag {
  const dragged = ref<number | null>(null);
  let stop: () => void = () => undefined;

  function follow(event: PointerEvent) {
    const from = dragged.value;
    if (from === null) return;
    const rows = [...(input.list.value?.querySelectorAll(input.rowSelector) ?? [])];
    const middles = rows.map((row) => {
      const { top, height } = row.getBoundingClientRect();
      return top + height / 2;
    });
    const above = middles.filter((middle, index) => index !== from && middle < event.clientY).length;
    if (above === from) return;
    input.move(from, above);
    dragged.value = above;
  }

  function start(event: PointerEvent, index: number) {
    if (event.button !== 0) return;
    event.preventDefault();
    const handle = event.currentTarget as HTMLElement;
    dragged.value = index;
    stop = () => {
      window.removeEventListener('pointermove', follow);
      window.removeEventListener('pointerup', stop);
      window.removeEventListener('pointercancel', stop);
      dragged.value = null;
    };
    handle.focus();
    window.addEventListener('pointermove', follow);
    window.addEventListener('pointerup', stop);
    window.addEventListener('pointercancel', stop);
  }

  onScopeDispose(() => stop());
  return { dragged, start };
}
