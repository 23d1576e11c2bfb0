import { type ComputedRef, type Ref, type ShallowRef, computed } from 'vue';

import { PAGE_LIMIT } from '#shared/contracts/common.ts';
import type { Ingredient } from '#shared/contracts/ingredient.ts';
import type { IngredientSnapshot } from '#shared/contracts/version.ts';
import { listIngredients } from '#src/api/ingredients.ts';
import { type LoadStatus, useLoaded } from '#src/composables/useLoaded.ts';

export interface BackBar {
  /** Everything a line may refer to, retired ones as well. */
  snapshots: ComputedRef<ReadonlyMap<string, IngredientSnapshot>>;
  /** What can be put on a line, by name. */
  offered: ComputedRef<readonly Ingredient[]>;
  /** Whether it was loaded once; it stays while it is loaded again. */
  isLoaded: ComputedRef<boolean>;
  status: Ref<LoadStatus>;
  failure: ShallowRef<unknown>;
  reload: () => Promise<void>;
}

/** The whole back bar of a team, loaded once, so that typing finds an ingredient without asking the server. */
export function useBackBar(teamId: string): BackBar {
  const { data, status, failure, reload } = useLoaded((signal) => loadAll(teamId, signal));
  const all = computed(() => data.value ?? []);
  return {
    snapshots: computed(() => new Map(all.value.map((each) => [each.id, snapshotOf(each)]))),
    offered: computed(() =>
      all.value
        .filter((each) => each.retiredAt === null)
        .sort((a, b) => a.name.localeCompare(b.name, undefined, { sensitivity: 'base' })),
    ),
    isLoaded: computed(() => data.value !== null),
    status,
    failure,
    reload,
  };
}

async function loadAll(teamId: string, signal: AbortSignal): Promise<Ingredient[]> {
  const all: Ingredient[] = [];
  let cursor: string | null | undefined;
  do {
    const page = await listIngredients(
      teamId,
      { limit: PAGE_LIMIT.max, retired: 'all', ...(cursor !== undefined && cursor !== null && { cursor }) },
      signal,
    );
    all.push(...page.items);
    cursor = page.nextCursor;
  } while (cursor !== null);
  return all;
}

/** What a version will remember of the ingredient. */
export function snapshotOf(ingredient: Ingredient): IngredientSnapshot {
  const { id, revision, name, category, composition, pieceMassG, allergens } = ingredient;
  return { id, revision, name, category, composition, pieceMassG, allergens };
}
