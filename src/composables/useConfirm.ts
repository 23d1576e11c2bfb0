import { type ShallowRef, shallowRef } from 'vue';

export interface Question {
  title: string;
  /** What will happen, in a sentence or two. */
  detail: string;
  confirmLabel: string;
  cancelLabel?: string;
}

interface OpenQuestion extends Question {
  answer: (confirmed: boolean) => void;
}

const openQuestion = shallowRef<OpenQuestion | null>(null);

/** Asks before something that is hard to undo. `ConfirmHost` in App.vue shows the question. */
export function useConfirm(): {
  openQuestion: ShallowRef<OpenQuestion | null>;
  confirm: (question: Question) => Promise<boolean>;
} {
  function confirm(question: Question): Promise<boolean> {
    openQuestion.value?.answer(false);
    return new Promise((resolve) => {
      openQuestion.value = {
        ...question,
        answer: (confirmed) => {
          openQuestion.value = null;
          resolve(confirmed);
        },
      };
    });
  }
  return { openQuestion, confirm };
}
