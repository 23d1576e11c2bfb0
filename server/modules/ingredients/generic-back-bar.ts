import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import type { Allergen, IngredientCategory, IngredientWrite, KnownBy } from '#shared/contracts/ingredient.ts';
import type { AcidsGPerL } from '#shared/physics/composition.ts';

import genericIngredients from './data/generic-ingredients.json' with { type: 'json' };
import { Ingredient } from './ingredient.entity.ts';
import { columnsOf } from './ingredient.mapper.ts';

/** One row of the data file: a generic ingredient with its source, fractions and g/L as in the contracts. */
interface GenericIngredient {
  name: string;
  category: IngredientCategory;
  abvFraction: number;
  sugarGPerL: number;
  acidsGPerL: AcidsGPerL;
  densityGPerMl: number | null;
  pieceMassG: number | null;
  how: KnownBy;
  spread: { abv: number; sugar: number; acid: number };
  contains: Allergen[];
  mayContain: Allergen[];
  source: string;
  note: string;
}

/**
 * The generic ingredients a new team starts from, without brands.
 *
 * A value seen in a handbook or given by a definition counts as handbook, one recalled as an estimate. Allergens are
 * never reviewed here: a generic entry cannot vouch for the bottle on the shelf.
 */
export function genericBackBar(): IngredientWrite[] {
  return (genericIngredients as GenericIngredient[]).map((row) => ({
    name: row.name,
    category: row.category,
    composition: {
      abvFraction: row.abvFraction,
      sugarGPerL: row.sugarGPerL,
      acidsGPerL: row.acidsGPerL,
      densityGPerMl: row.densityGPerMl,
    },
    knowledge: {
      abv: { how: row.how, spread: row.spread.abv },
      sugar: { how: row.how, spread: row.spread.sugar },
      acid: { how: row.how, spread: row.spread.acid },
    },
    pieceMassG: row.pieceMassG,
    allergens: { reviewed: false, contains: row.contains, mayContain: row.mayContain },
    source: row.source,
    note: row.note,
    packs: [],
  }));
}

/** Gives a new team the generic back bar; the caller flushes. */
export function stockTeam(em: EntityManager, teamId: string): void {
  for (const write of genericBackBar()) {
    em.create(Ingredient, { id: randomUUID(), team: teamId, ...columnsOf(write) });
  }
}
