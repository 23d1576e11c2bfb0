import type { Ref, ShallowRef } from 'vue';

import type { Glass } from '#shared/contracts/glass.ts';
import type { Spec } from '#shared/contracts/spec.ts';
import type { Version } from '#shared/contracts/version.ts';
import { listGlasses } from '#src/api/glasses.ts';
import { getSpec } from '#src/api/specs.ts';
import { listVersionsOfSpec } from '#src/api/versions.ts';
import { type LoadStatus, useLoaded } from '#src/composables/useLoaded.ts';

export interface BenchData {
  spec: Spec;
  versions: readonly Version[];
  /** Retired ones as well: a draft may still use one. */
  glasses: readonly Glass[];
}

/** What the bench needs of a spec, loaded together. */
export function useSpecBench(
  teamId: string,
  specId: () => string,
): {
  data: ShallowRef<BenchData | null>;
  status: Ref<LoadStatus>;
  failure: ShallowRef<unknown>;
  reload: () => Promise<void>;
} {
  return useLoaded(async (signal) => {
    const [spec, versions, glasses] = await Promise.all([
      getSpec(teamId, specId(), signal),
      listVersionsOfSpec(teamId, specId()),
      listGlasses(teamId),
    ]);
    return { spec, versions: versions.items, glasses: glasses.items };
  });
}
