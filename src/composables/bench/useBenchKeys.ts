import { useEventListener } from '@vueuse/core';

/**
 * Undo and redo of the whole bench by the keys everybody knows, also inside its fields: the field's own undo would not know of the other
 * fields.
 */
export function useBenchKeys(input: { isActive: () => boolean; undo: () => void; redo: () => void }): void {
  useEventListener(document, 'keydown', (event: KeyboardEvent) => {
    if (!input.isActive() || event.altKey || !(event.ctrlKey || event.metaKey)) return;
    const { target } = event;
    const isElsewhere = target instanceof HTMLElement && target.closest('[role="dialog"]') !== null;
    if (isElsewhere) return;
    const key = event.key.toLowerCase();
    const run = key === 'z' ? (event.shiftKey ? input.redo : input.undo) : key === 'y' ? input.redo : null;
    if (run === null) return;
    event.preventDefault();
    run();
  });
}
