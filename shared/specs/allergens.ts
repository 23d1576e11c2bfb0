import { ALLERGENS, type Allergen } from '../contracts/ingredient.ts';
import type { Figures, IngredientSnapshot } from '../contracts/version.ts';

/** Stands for an ingredient that is on a line and cannot be found, so that nothing is known of it. */
const UNKNOWN_INGREDIENT = 'an ingredient that cannot be found';

/**
 * Allergens of everything on the lines, whether or not their amounts can be read: a trace is enough.
 *
 * An ingredient that nobody has reviewed is named, and still counts for what it is known to contain. Only with an empty
 * `notReviewed` may a drink be called free of anything.
 * @param input.ingredientIds   ingredients of all lines, in order; null for a line without one
 * @param input.ingredients     the ingredients by id
 * @returns                     contained, possibly contained, and names of those not reviewed
 */
export function allergensOf(input: {
  readonly ingredientIds: readonly (string | null)[];
  readonly ingredients: ReadonlyMap<string, IngredientSnapshot>;
}): Figures['allergens'] {
  const contains = new Set<Allergen>();
  const mayContain = new Set<Allergen>();
  const notReviewed = new Set<string>();
  for (const id of input.ingredientIds) {
    if (id === null) continue;
    const ingredient = input.ingredients.get(id);
    if (ingredient === undefined) {
      notReviewed.add(UNKNOWN_INGREDIENT);
      continue;
    }
    const { allergens, name } = ingredient;
    if (!allergens.reviewed) notReviewed.add(name);
    for (const allergen of allergens.contains) contains.add(allergen);
    for (const allergen of allergens.mayContain) mayContain.add(allergen);
  }
  return {
    contains: ALLERGENS.filter((allergen) => contains.has(allergen)),
    mayContain: ALLERGENS.filter((allergen) => mayContain.has(allergen) && !contains.has(allergen)),
    notReviewed: [...notReviewed],
  };
}
