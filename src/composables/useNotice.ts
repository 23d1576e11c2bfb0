import { useQuasar } from 'quasar';

const UNDO_MS = 8000;

/** Short messages at the foot of the page. What needs an answer is a dialog, not a notice. */
export function useNotice(): {
  /** Something was done. */
  said: (message: string) => void;
  /** Something was done that can be taken back for a while. */
  undoable: (message: string, undo: () => void) => void;
} {
  const quasar = useQuasar();
  return {
    said: (message) => void quasar.notify({ message, attrs: { role: 'status' } }),
    undoable: (message, undo) =>
      void quasar.notify({
        message,
        timeout: UNDO_MS,
        attrs: { role: 'status' },
        actions: [{ label: 'Undo', handler: undo }],
      }),
  };
}
