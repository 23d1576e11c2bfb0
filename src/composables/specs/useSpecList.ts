import { type ComputedRef, computed, watch } from 'vue';
import { useRoute, useRouter } from 'vue-router';

import type { SpecSummary } from '#shared/contracts/spec.ts';
import { listSpecs } from '#src/api/specs.ts';
import { type KeysetList, useKeysetList } from '#src/composables/useKeysetList.ts';
import {
  NO_SPEC_FILTER,
  type SpecFilter,
  isSpecListNarrowed,
  queryFromSpecFilter,
  specFilterFromQuery,
  specListQuery,
} from './spec-filter.ts';

export interface SpecList extends KeysetList<SpecSummary> {
  filter: ComputedRef<SpecFilter>;
  isNarrowed: ComputedRef<boolean>;
  setFilter: (filter: SpecFilter) => void;
  clearFilter: () => void;
}

/** The specs of a team, as the filter in the address says; loads at once and whenever that changes. */
export function useSpecList(teamId: string): SpecList {
  const route = useRoute();
  const router = useRouter();
  const ownName = route.name;
  const filter = computed(() => specFilterFromQuery(route.query));
  const list = useKeysetList((cursor, signal) =>
    listSpecs(teamId, specListQuery(filter.value, cursor), signal),
  );

  watch(
    () => JSON.stringify(filter.value),
    () => {
      if (route.name === ownName) void list.reload();
    },
    { immediate: true },
  );

  function setFilter(now: SpecFilter) {
    void router.replace({ query: queryFromSpecFilter(now) });
  }

  return {
    ...list,
    filter,
    isNarrowed: computed(() => isSpecListNarrowed(filter.value)),
    setFilter,
    clearFilter: () => setFilter({ ...NO_SPEC_FILTER, sort: filter.value.sort }),
  };
}
