import type { Ingredient } from '#shared/contracts/ingredient.ts';
import { acidAsCitric } from '#shared/physics/acids.ts';
import { formatAbv, formatGPerL } from '#shared/text/format-quantity.ts';

/** What is in an ingredient, as short as a search result needs it: only what is there. */
export function ingredientWords(composition: Ingredient['composition']): string {
  const { abvFraction, sugarGPerL, acidsGPerL } = composition;
  const acid = acidAsCitric(acidsGPerL);
  const words = [
    abvFraction > 0 ? `${formatAbv(abvFraction)} ABV` : '',
    sugarGPerL > 0 ? `${formatGPerL(sugarGPerL)} sugar` : '',
    acid > 0 ? `${formatGPerL(acid)} acid` : '',
  ].filter((word) => word !== '');
  return words.length === 0 ? 'no alcohol, sugar or acid' : words.join(' · ');
}
