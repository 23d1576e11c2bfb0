import { type ComputedRef, type Ref, type ShallowRef, computed, ref, shallowRef } from 'vue';

import type { Spec } from '#shared/contracts/spec.ts';
import type { IngredientSnapshot, Version } from '#shared/contracts/version.ts';
import { completeDraft } from '#shared/specs/complete-draft.ts';
import { describeChanges } from '#shared/specs/describe-changes.ts';
import { ApiProblem } from '#src/api/http.ts';
import { getSpec, saveVersion } from '#src/api/specs.ts';
import { listVersionsOfSpec } from '#src/api/versions.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';
import type { SpecEditor } from './useSpecEditor.ts';

export interface VersionSaving {
  isOpen: Ref<boolean>;
  submission: Submission;
  /** The version the draft started from; null for the first. */
  base: ComputedRef<Version | null>;
  /** What the version will say has changed; null when there is nothing to compare with. */
  changes: ComputedRef<readonly string[] | null>;
  /** The version that was just saved, with the one it can be compared with. */
  saved: ShallowRef<{ version: Version; base: Version | null } | null>;
  /** Opens the question why, unless something on the lines stands in the way. */
  ask: () => boolean;
  confirm: (why: string) => Promise<void>;
}

/** Saves the draft as the next version: first the draft itself, then the version of it. */
export function useVersionSaving(input: {
  teamId: string;
  editor: SpecEditor;
  versions: Ref<readonly Version[]>;
  snapshots: Readonly<Ref<ReadonlyMap<string, IngredientSnapshot>>>;
}): VersionSaving {
  const { teamId, editor, versions } = input;
  const { saving } = editor;
  const isOpen = ref(false);
  const saved = shallowRef<VersionSaving['saved']['value']>(null);
  const submission = useSubmission(['#/why']);

  const base = computed(() => {
    const { draftBaseVersionId } = saving.server.value;
    return versions.value.find(({ id }) => id === draftBaseVersionId) ?? null;
  });
  const changes = computed(() => {
    const completed = completeDraft(editor.draft.value);
    const figures = editor.figures.value;
    if (base.value === null || !completed.ok || figures === null) return null;
    const ingredients = completed.body.lines.flatMap(
      ({ ingredientId }) => input.snapshots.value.get(ingredientId) ?? [],
    );
    const after = { body: completed.body, ingredients, glass: editor.glass.value, figures };
    return describeChanges({ before: base.value, after });
  });

  function ask(): boolean {
    submission.clear();
    saved.value = null;
    isOpen.value = editor.check();
    return isOpen.value;
  }

  async function send(why: string) {
    const from = base.value;
    if (!(await saving.flush())) {
      isOpen.value = saving.theirs.value === null;
      if (saving.failure.value !== null) throw saving.failure.value as Error;
      return;
    }
    const version = await saveVersion(teamId, saving.server.value, { why });
    saved.value = { version, base: from };
    isOpen.value = false;
    versions.value = [version, ...versions.value];
    await catchUp(version);
  }

  /** The version is saved whatever comes of this; without an answer the next save of the draft finds out. */
  async function catchUp(version: Version) {
    const [spec, list] = await Promise.allSettled([
      getSpec(teamId, version.specId),
      listVersionsOfSpec(teamId, version.specId),
    ]);
    if (spec.status === 'fulfilled') saving.adopt(spec.value);
    if (list.status === 'fulfilled') versions.value = list.value.items;
  }

  async function confirm(why: string) {
    await submission.submit(async () => {
      try {
        await send(why);
      } catch (error) {
        if (!(error instanceof ApiProblem) || !error.is('stale-version')) throw error;
        isOpen.value = false;
        saving.contest(error.problem.current as Spec);
      }
    });
  }

  return { isOpen, submission, base, changes, saved, ask, confirm };
}
