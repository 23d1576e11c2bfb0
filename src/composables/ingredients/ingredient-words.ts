import type { Ingredient, Pack } from '#shared/contracts/ingredient.ts';
import { formatMoney } from '#shared/text/format-money.ts';
import { formatTrimmed } from '#shared/text/format-number.ts';

/** How a value is known and how far it may be off, such as `label ±5 %`. */
export function spreadWords(known: Ingredient['knowledge']['abv']): string {
  return known.spread === 0
    ? known.how
    : `${known.how} ±${formatTrimmed({ value: known.spread * 100, decimals: 1 })} %`;
}

/** A pack with its price, such as `700 ml, 18.50 EUR (2026-03-01)`. */
export function packWords(pack: Pack, currency: string): string {
  const size = `${formatTrimmed({ value: pack.size, decimals: 2 })} ${pack.sizeUnit}`;
  if (pack.price === null) return `${size}, price not known`;
  const price = formatMoney({ amount: pack.price, currency });
  return pack.pricedOn === null ? `${size}, ${price}` : `${size}, ${price} (${pack.pricedOn})`;
}

/** Whether anybody has looked at the allergens, and what was found; never `none` before that. */
export function allergenSummary({ allergens }: Pick<Ingredient, 'allergens'>): string {
  const found = [
    ...allergens.contains,
    ...allergens.mayContain.map((allergen) => `may contain ${allergen}`),
  ].join(', ');
  if (!allergens.reviewed) return found === '' ? 'not reviewed' : `not reviewed; ${found}`;
  return found === '' ? 'none' : found;
}
