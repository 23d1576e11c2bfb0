import { type ComputedRef, type ShallowRef, computed, shallowRef } from 'vue';

import type { Glass, GlassWrite } from '#shared/contracts/glass.ts';
import { createGlass, listGlasses, restoreGlass, retireGlass, updateGlass } from '#src/api/glasses.ts';
import { ApiProblem } from '#src/api/http.ts';
import { type Loaded, useLoaded } from '#src/composables/useLoaded.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';

export interface GlassShelf extends Pick<Loaded<unknown>, 'status' | 'failure' | 'reload'> {
  /** In use first, then retired ones. */
  glasses: ComputedRef<readonly Glass[]>;
  submission: Submission;
  /** The glass as somebody else saved it while it was being edited here. */
  theirs: ShallowRef<Glass | null>;
  /** Adds a glass, or saves `based`; true when it was saved. */
  save: (body: GlassWrite, based: Glass | null) => Promise<boolean>;
  setRetired: (glass: Glass, isRetired: boolean) => Promise<boolean>;
}

/** The team's glasses, and every change of them. */
export function useGlassShelf(teamId: string): GlassShelf {
  const loaded = useLoaded(async () => (await listGlasses(teamId)).items);
  const submission = useSubmission();
  const theirs = shallowRef<Glass | null>(null);

  const glasses = computed(() =>
    [...(loaded.data.value ?? [])].sort(
      (a, b) => Number(a.retiredAt !== null) - Number(b.retiredAt !== null) || a.name.localeCompare(b.name),
    ),
  );

  async function send(body: GlassWrite, based: Glass | null): Promise<void> {
    theirs.value = null;
    try {
      await (based === null ? createGlass(teamId, body) : updateGlass(teamId, based, body));
    } catch (error) {
      if (!(error instanceof ApiProblem) || !error.is('stale-version')) throw error;
      theirs.value = error.problem.current as Glass;
    }
  }

  async function save(body: GlassWrite, based: Glass | null): Promise<boolean> {
    const isSent = await submission.submit(() => send(body, based));
    const isSaved = isSent && theirs.value === null;
    if (isSaved) await loaded.reload();
    return isSaved;
  }

  async function setRetired(glass: Glass, isRetired: boolean): Promise<boolean> {
    const isDone = await submission.submit(() =>
      isRetired ? retireGlass(teamId, glass) : restoreGlass(teamId, glass),
    );
    if (isDone) await loaded.reload();
    return isDone;
  }

  return {
    glasses,
    status: loaded.status,
    failure: loaded.failure,
    reload: loaded.reload,
    submission,
    theirs,
    save,
    setRetired,
  };
}
