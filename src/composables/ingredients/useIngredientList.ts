import { type Ref, computed, onScopeDispose, ref, watch } from 'vue';

import type { Ingredient, IngredientCategory, IngredientListQuery } from '#shared/contracts/ingredient.ts';
import { listIngredients } from '#src/api/ingredients.ts';
import { type KeysetList, useKeysetList } from '#src/composables/useKeysetList.ts';

export interface IngredientFilter {
  search: string;
  category: IngredientCategory | null;
  sort: NonNullable<IngredientListQuery['sort']>;
  retired: NonNullable<IngredientListQuery['retired']>;
}

export interface IngredientList extends KeysetList<Ingredient> {
  filter: Ref<IngredientFilter>;
  /** Whether something narrows the list, so that nothing found is told apart from an empty back bar. */
  isFiltered: Ref<boolean>;
  clearFilter: () => void;
}

const TYPING_PAUSE_MS = 250;

/** The back bar, searched as one types. */
export function useIngredientList(teamId: string): IngredientList {
  const filter = ref<IngredientFilter>(noFilter());
  const list = useKeysetList((cursor, signal) =>
    listIngredients(teamId, queryFrom(filter.value, cursor), signal),
  );

  let timer: ReturnType<typeof setTimeout> | undefined;
  watch(filter, (now, before) => {
    clearTimeout(timer);
    timer = setTimeout(() => void list.reload(), now.search === before.search ? 0 : TYPING_PAUSE_MS);
  });
  onScopeDispose(() => clearTimeout(timer));

  return {
    ...list,
    filter,
    isFiltered: computed(
      () =>
        filter.value.search.trim() !== '' ||
        filter.value.category !== null ||
        filter.value.retired === 'only',
    ),
    clearFilter: () => (filter.value = { ...noFilter(), sort: filter.value.sort }),
  };
}

function noFilter(): IngredientFilter {
  return { search: '', category: null, sort: 'name', retired: 'no' };
}

function queryFrom(filter: IngredientFilter, cursor: string | null): IngredientListQuery {
  const search = filter.search.trim();
  return {
    sort: filter.sort,
    retired: filter.retired,
    ...(search !== '' && { search }),
    ...(filter.category !== null && { category: filter.category }),
    ...(cursor !== null && { cursor }),
  };
}
