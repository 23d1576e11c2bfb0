import { type Ref, computed, onScopeDispose, ref, watch } from 'vue';

import type { SpecSummary } from '#shared/contracts/spec.ts';
import type { Version } from '#shared/contracts/version.ts';
import { listSpecs } from '#src/api/specs.ts';
import { listVersionsOfSpec } from '#src/api/versions.ts';
import { useLoaded } from '#src/composables/useLoaded.ts';

export interface VersionPicker {
  search: Ref<string>;
  specs: Ref<readonly SpecSummary[]>;
  openSpecId: Ref<string | null>;
  versions: Ref<readonly Version[]>;
  isLoading: Ref<boolean>;
  failure: Ref<unknown>;
  start: () => Promise<void>;
  openSpec: (specId: string) => void;
}

const TYPING_PAUSE_MS = 250;
const SHOWN_SPECS = 20;

/** Finds versions of any spec of the team by the drink's name. */
export function useVersionPicker(teamId: string): VersionPicker {
  const search = ref('');
  const openSpecId = ref<string | null>(null);
  const found = useLoaded(async (signal) => {
    const text = search.value.trim();
    const query = { sort: 'name' as const, limit: SHOWN_SPECS, ...(text !== '' && { search: text }) };
    return (await listSpecs(teamId, query, signal)).items;
  });
  const opened = useLoaded(async () =>
    openSpecId.value === null ? [] : (await listVersionsOfSpec(teamId, openSpecId.value)).items,
  );

  let timer: ReturnType<typeof setTimeout> | undefined;
  watch(search, () => {
    clearTimeout(timer);
    timer = setTimeout(() => void found.reload(), TYPING_PAUSE_MS);
  });
  onScopeDispose(() => clearTimeout(timer));

  return {
    search,
    specs: computed(() => found.data.value ?? []),
    openSpecId,
    versions: computed(() => (opened.status.value === 'ready' ? (opened.data.value ?? []) : [])),
    isLoading: computed(
      () =>
        found.status.value === 'loading' || (openSpecId.value !== null && opened.status.value === 'loading'),
    ),
    failure: computed(() => found.failure.value ?? opened.failure.value),
    start: found.reload,
    openSpec(specId) {
      openSpecId.value = openSpecId.value === specId ? null : specId;
      void opened.reload();
    },
  };
}
