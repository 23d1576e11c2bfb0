import { ALLERGENS, type Allergen, US_MAJOR_ALLERGENS } from '#shared/contracts/ingredient.ts';
import type { Figures } from '#shared/contracts/version.ts';

/** Names of the 14 groups as a guest would be told them. */
export const ALLERGEN_NAMES: Readonly<Record<Allergen, string>> = {
  gluten: 'cereals with gluten',
  crustaceans: 'crustaceans',
  eggs: 'eggs',
  fish: 'fish',
  peanuts: 'peanuts',
  soybeans: 'soybeans',
  milk: 'milk',
  nuts: 'tree nuts',
  celery: 'celery',
  mustard: 'mustard',
  sesame: 'sesame',
  sulphites: 'sulphites',
  lupin: 'lupin',
  molluscs: 'molluscs',
};

/** The United States list names wheat where the European one names all cereals with gluten. */
const US_NAMES: Readonly<Partial<Record<Allergen, string>>> = { gluten: 'wheat (where the cereal is wheat)' };

export interface AllergenWords {
  contains: string;
  mayContain: string | null;
  notReviewed: string | null;
  usMajor: string;
}

/**
 * The allergen statement of a drink. `none` is said only when every ingredient was reviewed: an ingredient that
 * nobody looked at makes the answer unknown.
 */
export function allergenWords(allergens: Figures['allergens']): AllergenWords {
  const { contains, mayContain, notReviewed } = allergens;
  const isReviewed = notReviewed.length === 0;
  const major = US_MAJOR_ALLERGENS.filter((allergen) => contains.includes(allergen));
  return {
    contains: listed(contains, ALLERGEN_NAMES) ?? (isReviewed ? 'none of the 14 groups' : 'not known yet'),
    mayContain: listed(mayContain, ALLERGEN_NAMES),
    notReviewed: isReviewed ? null : notReviewed.join(', '),
    usMajor:
      listed(major, { ...ALLERGEN_NAMES, ...US_NAMES }) ??
      (isReviewed ? 'none of the 9 major allergens' : 'not known yet'),
  };
}

function listed(allergens: readonly Allergen[], names: Readonly<Record<Allergen, string>>): string | null {
  if (allergens.length === 0) return null;
  return ALLERGENS.filter((allergen) => allergens.includes(allergen))
    .map((allergen) => names[allergen])
    .join(', ');
}
