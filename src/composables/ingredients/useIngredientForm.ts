import { type Ref, computed, ref, shallowRef, watch } from 'vue';

import type { Ingredient, IngredientWrite } from '#shared/contracts/ingredient.ts';
import { ApiProblem } from '#src/api/http.ts';
import { createIngredient, updateIngredient } from '#src/api/ingredients.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';
import { type ConflictRow, conflictRows, mergeDrafts } from './conflict.ts';
import { type IngredientDraft, draftFromIngredient, emptyIngredientDraft } from './ingredient-draft.ts';
import { ingredientFromDraft } from './ingredient-write.ts';

export interface IngredientForm extends Pick<Submission, 'isSaving' | 'failure' | 'errors' | 'errorAt'> {
  draft: Ref<IngredientDraft>;
  isDirty: Ref<boolean>;
  /** What differs from the state somebody else saved meanwhile; null while there is no conflict. */
  conflict: Ref<ConflictRow[] | null>;
  open: (ingredient: Ingredient | null) => void;
  /** The saved ingredient, or null when it was not saved. */
  save: () => Promise<Ingredient | null>;
  resolveConflict: (takeTheirs: readonly (keyof IngredientDraft)[]) => Promise<Ingredient | null>;
}

/** The form of one ingredient: what was typed, what is wrong with it, and what others saved meanwhile. */
export function useIngredientForm(teamId: string): IngredientForm {
  const draft = ref<IngredientDraft>(emptyIngredientDraft());
  const opened = ref(JSON.stringify(draft.value));
  const base = shallowRef<Ingredient | null>(null);
  const theirs = shallowRef<Ingredient | null>(null);
  const submission = useSubmission();

  function open(ingredient: Ingredient | null) {
    base.value = ingredient;
    theirs.value = null;
    submission.clear();
    draft.value = ingredient === null ? emptyIngredientDraft() : draftFromIngredient(ingredient);
    opened.value = JSON.stringify(draft.value);
  }

  // Once something was wrong, each change is checked as it is made, so that a message goes when its cause does.
  watch(
    draft,
    (now) => {
      if (submission.errors.value.length === 0) return;
      const read = ingredientFromDraft(now);
      submission.refuse(read.ok ? [] : read.errors);
    },
    { deep: true },
  );

  function send(body: IngredientWrite): Promise<Ingredient> {
    return base.value === null ? createIngredient(teamId, body) : updateIngredient(teamId, base.value, body);
  }

  /** Somebody else's save is no failure: it is shown beside what was typed here. */
  async function sendOrKeepTheirs(body: IngredientWrite): Promise<Ingredient | null> {
    try {
      return await send(body);
    } catch (error) {
      if (!(error instanceof ApiProblem) || !error.is('stale-version')) throw error;
      theirs.value = error.problem.current as Ingredient;
      return null;
    }
  }

  async function save(): Promise<Ingredient | null> {
    const read = ingredientFromDraft(draft.value);
    if (!read.ok) {
      submission.refuse(read.errors);
      return null;
    }
    const answers: (Ingredient | null)[] = [];
    await submission.submit(async () => answers.push(await sendOrKeepTheirs(read.body)));
    const saved = answers[0] ?? null;
    if (saved !== null) open(saved);
    return saved;
  }

  function resolveConflict(takeTheirs: readonly (keyof IngredientDraft)[]) {
    if (theirs.value !== null) {
      const stored = draftFromIngredient(theirs.value);
      draft.value = mergeDrafts({ mine: draft.value, theirs: stored, takeTheirs });
      base.value = theirs.value;
      theirs.value = null;
    }
    return save();
  }

  return {
    draft,
    isDirty: computed(() => JSON.stringify(draft.value) !== opened.value),
    isSaving: submission.isSaving,
    failure: submission.failure,
    errors: submission.errors,
    errorAt: submission.errorAt,
    conflict: computed(() =>
      theirs.value === null ? null : conflictRows(draft.value, draftFromIngredient(theirs.value)),
    ),
    open,
    save,
    resolveConflict,
  };
}
