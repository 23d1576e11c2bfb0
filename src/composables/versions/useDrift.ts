import { type ComputedRef, computed } from 'vue';

import type { Ingredient } from '#shared/contracts/ingredient.ts';
import type { IngredientSnapshot, Version } from '#shared/contracts/version.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import { figureDifferences } from '#shared/specs/figure-differences.ts';
import { type ShownUnits, formatFigure, formatFigureDifference } from '#shared/text/format-figure.ts';
import { getIngredient } from '#src/api/ingredients.ts';
import { type Loaded, useLoaded } from '#src/composables/useLoaded.ts';

/** A figure that has moved since the version was signed, in words. */
export interface DriftRow {
  label: string;
  signed: string;
  now: string;
  difference: string;
}

export interface Drift {
  rows: DriftRow[];
  /** Ingredients edited since the version was saved. */
  changedIngredients: string[];
}

export interface LoadedDrift extends Pick<Loaded<unknown>, 'status' | 'failure'> {
  drift: ComputedRef<Drift | null>;
  load: (version: Version) => Promise<void>;
}

/** What the same spec would come to with the ingredients as they are known now. */
export function driftOf(input: {
  version: Version;
  currentIngredients: readonly IngredientSnapshot[];
  units: ShownUnits;
}): Drift {
  const { version, currentIngredients, units } = input;
  const ingredients = new Map(currentIngredients.map((ingredient) => [ingredient.id, ingredient]));
  const { body, glass, houseMeasures } = version;
  const { figures } = evaluateSpec({ body, ingredients, glass, houseMeasures });
  const rows = figureDifferences([version.figures, figures]).flatMap(
    ({ figure, label, cells }): DriftRow[] => {
      const [signed, now] = cells;
      if (signed === undefined || now === undefined || now.direction === 'same') return [];
      if (signed.value === null && now.value === null) return [];
      return [
        {
          label,
          signed: formatFigure({ figure, value: signed.value, ...units }),
          now: formatFigure({ figure, value: now.value, ...units }),
          difference: formatFigureDifference({ figure, cell: now, ...units }),
        },
      ];
    },
  );
  const changedIngredients = version.ingredients
    .filter(({ id, revision }) => ingredients.get(id)?.revision !== revision)
    .map(({ name }) => name);
  return { rows, changedIngredients };
}

/** Loads the ingredients of a version as they are now and tells how far it has drifted. */
export function useDrift(teamId: string, units: () => ShownUnits): LoadedDrift {
  let wanted: Version | null = null;
  const loaded = useLoaded(async () => {
    const version = wanted;
    if (version === null) return null;
    const current = await Promise.all(version.ingredients.map(({ id }) => getIngredient(teamId, id)));
    return { version, currentIngredients: current.map(snapshotOf) };
  });

  return {
    status: loaded.status,
    failure: loaded.failure,
    drift: computed(() =>
      loaded.data.value === null ? null : driftOf({ ...loaded.data.value, units: units() }),
    ),
    load(version) {
      wanted = version;
      return loaded.reload();
    },
  };
}

function snapshotOf(ingredient: Ingredient): IngredientSnapshot {
  const { id, revision, name, category, composition, pieceMassG, allergens } = ingredient;
  return { id, revision, name, category, composition, pieceMassG, allergens };
}
