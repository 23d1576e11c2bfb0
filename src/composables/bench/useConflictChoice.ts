import { type ComputedRef, computed } from 'vue';

import type { Spec } from '#shared/contracts/spec.ts';
import { formatTime } from '#src/composables/format-time.ts';
import { blankLine, insertLines } from './draft-edits.ts';
import { linesNotIn } from './draft-words.ts';
import type { SpecEditor } from './useSpecEditor.ts';

export interface ConflictChoice {
  /** What somebody else saved; null while there is no conflict. */
  theirs: ComputedRef<Spec | null>;
  /** By whom and when. */
  theirWords: ComputedRef<string>;
  /** Each settles the conflict; what was on the page before can be brought back by Undo. */
  keepMine: () => void;
  takeTheirs: () => void;
  /** Theirs, and the lines that only mine has under them. */
  takeBoth: () => void;
}

export function useConflictChoice(editor: SpecEditor): ConflictChoice {
  const theirs = computed(() => editor.saving.theirs.value);

  function settleWith(change: (other: Spec) => void) {
    const other = theirs.value;
    if (other === null) return;
    change(other);
    editor.saving.settle();
  }

  return {
    theirs,
    theirWords: computed(() => {
      if (theirs.value === null) return '';
      const { updatedBy, updatedAt } = theirs.value;
      return `by ${updatedBy?.name ?? 'somebody'}, ${formatTime(updatedAt)}`;
    }),
    keepMine: () => settleWith(() => undefined),
    takeTheirs: () => settleWith((other) => editor.replace(other.draft)),
    takeBoth: () =>
      settleWith((other) => {
        const extra = linesNotIn({ draft: editor.draft.value, other: other.draft });
        const copies = extra.map(({ id: _id, ...line }) => blankLine(line));
        editor.replace(insertLines(other.draft, other.draft.lines.length, copies));
      }),
  };
}
