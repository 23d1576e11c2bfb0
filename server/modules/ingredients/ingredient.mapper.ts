import type {
  CompositionKnowledge,
  Ingredient as IngredientResource,
  IngredientWrite,
} from '#shared/contracts/ingredient.ts';
import { type Role, hasPermission } from '#shared/contracts/roles.ts';
import type { IngredientSnapshot } from '#shared/contracts/version.ts';
import { acidAsCitric } from '#shared/physics/acids.ts';
import type { Composition } from '#shared/physics/composition.ts';
import { densityInUseGPerMl } from '#shared/physics/contents.ts';

import type { Ingredient } from './ingredient.entity.ts';

/** The ingredient as a member with these roles sees it: packs and prices only with `see-costs`. */
export function toIngredient(ingredient: Ingredient, roles: readonly Role[]): IngredientResource {
  const composition = compositionOf(ingredient);
  return {
    id: ingredient.id,
    revision: ingredient.revision,
    name: ingredient.name,
    category: ingredient.category,
    composition,
    knowledge: ingredient.knowledge,
    pieceMassG: ingredient.pieceMassG ?? null,
    allergens: ingredient.allergens,
    source: ingredient.source,
    note: ingredient.note,
    computedDensityGPerMl: densityInUseGPerMl(composition),
    packs: hasPermission(roles, 'see-costs') ? ingredient.packs : null,
    retiredAt: ingredient.retiredAt?.toISOString() ?? null,
    createdAt: ingredient.createdAt.toISOString(),
    updatedAt: ingredient.updatedAt.toISOString(),
  };
}

/** The ingredient as a version remembers it. */
export function toIngredientSnapshot(ingredient: Ingredient): IngredientSnapshot {
  return {
    id: ingredient.id,
    revision: ingredient.revision,
    name: ingredient.name,
    category: ingredient.category,
    composition: compositionOf(ingredient),
    pieceMassG: ingredient.pieceMassG ?? null,
    allergens: ingredient.allergens,
  };
}

/** What of an ingredient a person writes, as it is kept. */
type WrittenColumns = ReturnType<typeof columnsOf> | Ingredient;

/** Everything a person may write, as it stands: what an import compares with and an export writes. */
export function toIngredientWrite(ingredient: WrittenColumns): IngredientWrite {
  return {
    name: ingredient.name,
    category: ingredient.category,
    composition: compositionOf(ingredient),
    knowledge: ingredient.knowledge,
    pieceMassG: ingredient.pieceMassG ?? null,
    allergens: ingredient.allergens,
    source: ingredient.source,
    note: ingredient.note,
    packs: ingredient.packs,
  };
}

function compositionOf(ingredient: WrittenColumns): Composition {
  return {
    abvFraction: ingredient.abvFraction,
    sugarGPerL: ingredient.sugarGPerL,
    acidsGPerL: ingredient.acidsGPerL,
    densityGPerMl: ingredient.densityGPerMl ?? null,
  };
}

/** The columns of what was written, each named: a new column never comes in by itself. */
export function columnsOf(write: IngredientWrite) {
  const { composition } = write;
  return {
    name: write.name.trim(),
    category: write.category,
    abvFraction: tidyFraction(composition.abvFraction),
    sugarGPerL: composition.sugarGPerL,
    acidsGPerL: presentAcids(composition.acidsGPerL),
    acidCitricGPerL: acidAsCitric(composition.acidsGPerL),
    densityGPerMl: composition.densityGPerMl,
    knowledge: tidyKnowledge(write.knowledge),
    pieceMassG: write.pieceMassG,
    allergens: write.allergens,
    packs: write.packs,
    source: write.source.trim(),
    note: write.note.trim(),
  };
}

/** Digits that a fraction keeps on its way to percent and back. */
const FRACTION_DIGITS = 15;

/** A fraction without the trace that dividing percents leaves: 33.3 / 100 is kept as 0.333, and a CSV gives it back alike. */
function tidyFraction(fraction: number): number {
  return Number(fraction.toPrecision(FRACTION_DIGITS));
}

function tidyKnowledge({ abv, sugar, acid }: CompositionKnowledge): CompositionKnowledge {
  const tidy = ({ how, spread }: CompositionKnowledge['abv']) => ({ how, spread: tidyFraction(spread) });
  return { abv: tidy(abv), sugar: tidy(sugar), acid: tidy(acid) };
}

/** Acids that are there: 0 g/L and not named are the same. */
export function presentAcids(acidsGPerL: Composition['acidsGPerL']): Composition['acidsGPerL'] {
  return Object.fromEntries(Object.entries(acidsGPerL).filter(([, value]) => value > 0));
}
