import fc from 'fast-check';

import {
  ALLERGENS,
  INGREDIENT_CATEGORIES,
  type IngredientWrite,
  KNOWN_BY,
} from '#shared/contracts/ingredient.ts';
import { ACID_KEYS } from '#shared/physics/composition.ts';

const CONTROL = /\p{Cc}/gu;

/** Text that a person may write, among it what spreadsheets take for formulas, quotes, separators and line breaks. */
const text = fc
  .array(
    fc.oneof(
      fc.string({ unit: 'grapheme', maxLength: 8 }),
      fc.constantFrom(
        '=1+1',
        '+',
        '-',
        '@',
        "'",
        "'=",
        '"',
        ',',
        ';',
        '\n',
        '\r\n',
        '\t',
        'é',
        '柚子',
        '🍋',
        ' ',
      ),
    ),
    { maxLength: 8 },
  )
  .map((parts) =>
    parts
      .join('')
      .replaceAll(CONTROL, (sign) => (/[\t\n\r]/.test(sign) ? sign : ''))
      .trim(),
  );

const name = text.map((value) => value.replaceAll(CONTROL, ' ').trim()).filter((value) => value !== '');

/** A share of one as forms make it, by dividing percents, which leaves traces in the last digits; or any other. */
const fraction = (max: number) =>
  fc.oneof(
    fc.integer({ min: 0, max: max * 1000 }).map((n) => n / 10 / 100),
    fc.double({ min: 0, max, noNaN: true, minExcluded: false }).filter((n) => n === 0 || n > 1e-12),
  );
const gPerL = (max: number) =>
  fc.oneof(
    fc.constant(0),
    fc.integer({ min: 1, max: max * 10 }).map((n) => n / 10),
    fc.double({ min: 1e-9, max, noNaN: true }),
  );

const knowledge = fc.record({ how: fc.constantFrom(...KNOWN_BY), spread: fraction(1) });
const calendarDate = fc
  .integer({ min: 0, max: 3000 })
  .map((day) => new Date(Date.UTC(2020, 0, 1 + day)).toISOString().slice(0, 10));
const pack = fc.record({
  size: fc.integer({ min: 1, max: 100_000 }).map((n) => n / 4),
  sizeUnit: fc.constantFrom('ml' as const, 'g' as const, 'piece' as const),
  price: fc.option(fc.integer({ min: 0, max: 999_999 }).map((cents) => (cents / 100).toFixed(2))),
  pricedOn: fc.option(calendarDate),
});

/** Every kind of ingredient that fits into its litre; half of a litre is left for water. */
export const ingredientWrites: fc.Arbitrary<IngredientWrite> = fc.record({
  name,
  category: fc.constantFrom(...INGREDIENT_CATEGORIES),
  composition: fc.record({
    abvFraction: fraction(0.4),
    sugarGPerL: gPerL(150),
    acidsGPerL: fc.record(Object.fromEntries(ACID_KEYS.map((acid) => [acid, gPerL(9)])), {
      requiredKeys: [],
    }),
    densityGPerMl: fc.option(fc.integer({ min: 1060, max: 1200 }).map((n) => n / 1000)),
  }),
  knowledge: fc.record({ abv: knowledge, sugar: knowledge, acid: knowledge }),
  pieceMassG: fc.option(fc.integer({ min: 1, max: 4000 }).map((n) => n / 4)),
  allergens: fc
    .tuple(fc.boolean(), fc.uniqueArray(fc.constantFrom(...ALLERGENS), { maxLength: 6 }), fc.nat({ max: 6 }))
    .map(([reviewed, named, cut]) => ({
      reviewed,
      contains: named.slice(0, cut),
      mayContain: named.slice(cut),
    })),
  packs: fc.array(pack, { maxLength: 3 }),
  source: text,
  note: text,
});
