import { type ComputedRef, type Ref, computed, watch } from 'vue';

import type { Spec, SpecUpdate } from '#shared/contracts/spec.ts';
import type { Version } from '#shared/contracts/version.ts';
import {
  branchSpec,
  getSpec,
  restoreSpec,
  retireSpec,
  startDraftFromVersion,
  updateSpec,
} from '#src/api/specs.ts';
import { listVersionsOfSpec } from '#src/api/versions.ts';
import { type Loaded, useLoaded } from '#src/composables/useLoaded.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';

export interface SpecHistory extends Pick<Loaded<unknown>, 'status' | 'failure' | 'reload'> {
  spec: ComputedRef<Spec | null>;
  /** Newest first. */
  versions: ComputedRef<readonly Version[]>;
  submission: Submission;
  rename: (names: SpecUpdate) => Promise<boolean>;
  setRetired: (isRetired: boolean) => Promise<boolean>;
  /** The new variant, or null when it was not made. */
  branch: (from: Version, variantName: string) => Promise<Spec | null>;
  startDraft: (from: Version) => Promise<boolean>;
}

/** A spec with its versions, and what can be done with them. */
export function useSpecHistory(teamId: string, specId: Readonly<Ref<string>>): SpecHistory {
  const loaded = useLoaded(async (signal) => {
    const [spec, list] = await Promise.all([
      getSpec(teamId, specId.value, signal),
      listVersionsOfSpec(teamId, specId.value),
    ]);
    return { spec, versions: list.items };
  });
  const submission = useSubmission(['#/name', '#/variantName', '#/description']);
  watch(specId, () => void loaded.reload(), { immediate: true });
  const spec = computed(() => loaded.data.value?.spec ?? null);

  /** Sends a change of the spec as it is shown, and shows what came back. */
  function change(send: (based: Spec) => Promise<Spec>): Promise<boolean> {
    return submission.submit(async () => {
      if (loaded.data.value === null) return;
      const changed = await send(loaded.data.value.spec);
      loaded.data.value = { ...loaded.data.value, spec: changed };
    });
  }

  async function branch(from: Version, variantName: string): Promise<Spec | null> {
    const made: Spec[] = [];
    await submission.submit(async () =>
      made.push(await branchSpec(teamId, specId.value, { fromVersionId: from.id, variantName })),
    );
    return made[0] ?? null;
  }

  return {
    spec,
    versions: computed(() => loaded.data.value?.versions ?? []),
    status: loaded.status,
    failure: loaded.failure,
    reload: loaded.reload,
    submission,
    rename: (names) => change((based) => updateSpec(teamId, based, names)),
    setRetired: (isRetired) =>
      change((based) => (isRetired ? retireSpec(teamId, based) : restoreSpec(teamId, based))),
    branch,
    startDraft: (from) => change((based) => startDraftFromVersion(teamId, based, { versionId: from.id })),
  };
}
