/** Units an amount may be written in. */
export const AMOUNT_UNITS = ['ml', 'cl', 'oz', 'g', 'dash', 'bar spoon', 'drop', 'piece', 'part'] as const;
export type AmountUnit = (typeof AMOUNT_UNITS)[number];

export interface Amount {
  readonly value: number;
  readonly unit: AmountUnit;
}

/** Limits of one line's amount, whatever its unit: more is a slip of the hand. */
export const AMOUNT_VALUE_RANGE = { exclusiveMin: 0, max: 10_000 } as const;

/** Less than this, in any unit, is not measured behind a bar: it is a slip of the hand too. */
export const SMALLEST_READABLE_VALUE = 0.001;

/** Words that are read as each unit, in lower case and without full stops or hyphens. `oz` is the US fluid ounce. */
const WORDS_OF_UNIT: Readonly<Record<AmountUnit, readonly string[]>> = {
  ml: ['ml', 'mls', 'millilitre', 'millilitres', 'milliliter', 'milliliters', 'cc'],
  cl: ['cl', 'cls', 'centilitre', 'centilitres', 'centiliter', 'centiliters'],
  oz: ['oz', 'ozs', 'ounce', 'ounces', 'fl oz', 'floz', 'fluid ounce', 'fluid ounces', 'us fl oz'],
  g: ['g', 'gr', 'gm', 'gms', 'gram', 'grams', 'gramme', 'grammes'],
  dash: ['dash', 'dashes', 'ds', 'dsh'],
  'bar spoon': ['bar spoon', 'bar spoons', 'barspoon', 'barspoons', 'bsp', 'bsps', 'bs'],
  drop: ['drop', 'drops'],
  piece: ['piece', 'pieces', 'pc', 'pcs'],
  part: ['part', 'parts'],
};

const UNIT_OF_WORD: ReadonlyMap<string, AmountUnit> = new Map(
  AMOUNT_UNITS.flatMap((unit) => WORDS_OF_UNIT[unit].map((word) => [word, unit] as const)),
);

/** What to write in place of units that are left out on purpose: too large, or not the same everywhere. */
const ADVICE_OF_WORD: ReadonlyMap<string, string> = new Map([
  ...['l', 'litre', 'litres', 'liter', 'liters'].map((word) => [word, '1 litre is 1000 ml'] as const),
  ['dl', '1 dl is 100 ml'],
  ['kg', '1 kg is 1000 g'],
  ['mg', '1000 mg is 1 g'],
  ...['tsp', 'teaspoon', 'teaspoons'].map((word) => [word, 'a metric teaspoon is 5 ml'] as const),
  ...['tbsp', 'tablespoon', 'tablespoons'].map((word) => [word, 'a metric tablespoon is 15 ml'] as const),
]);

function bareWord(text: string): string {
  return text
    .replace(/\./g, '')
    .replace(/[\s-]+/g, ' ')
    .trim();
}

/** The unit that a word stands for. */
export function unitOfWord(text: string): AmountUnit | undefined {
  return UNIT_OF_WORD.get(bareWord(text));
}

/** A hint for a unit that is known and not taken. */
export function adviceForUnit(text: string): string | undefined {
  return ADVICE_OF_WORD.get(bareWord(text));
}

/** Whether a text names several units one after the other, such as `ml oz`. */
export function namesSeveralUnits(text: string): boolean {
  const words = bareWord(text).split(' ');
  return words.length > 1 && words.every((word) => UNIT_OF_WORD.has(word));
}
