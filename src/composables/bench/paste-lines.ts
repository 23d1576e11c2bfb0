/** A recipe as text, pasted into the lines: an amount and a name in each line of it, in either order. */
import type { LineStage } from '#shared/contracts/spec.ts';
import { type AmountUnit, amountTextWithUnit, parseAmount } from '#shared/units/amount.ts';
import { type Searchable, meantIngredient } from './search-ingredients.ts';

export interface PastableIngredient extends Searchable {
  readonly pieceMassG: number | null;
}

export interface PastedLine {
  readonly ingredientId: string | null;
  readonly amountText: string;
  readonly stage: LineStage;
  /** What could not be matched, so that nothing that was pasted is lost. */
  readonly note: string;
}

/** `1 1/2 fluid ounces` is the longest way to write an amount. */
const MOST_AMOUNT_WORDS = 4;
/** So many of a thing that comes in pieces are pieces, not millilitres: `1 egg white`. */
const MOST_PIECES = 4;
const MAX_AMOUNT_CHARACTERS = 40;
const MAX_NOTE_CHARACTERS = 300;
const BULLET = /^(?:[-*•–—]|\d+[.)])\s+/;
const TOP = /^(?:top(?: up)?(?: with)?|topped(?: up)? with|fill(?: up)? with)\b:?\s*/i;

/** Whether a pasted text is more than one line of a recipe. */
export function isRecipeText(text: string): boolean {
  return recipeRows(text).length > 1;
}

function recipeRows(text: string): string[] {
  return text
    .split(/\r?\n|\t*;\s*/)
    .map((row) => row.replace(BULLET, '').replace(/\s+/g, ' ').trim())
    .filter((row) => row !== '');
}

/**
 * Reads a recipe line by line.
 *
 * @param input.text          such as `60 ml white rum` and `22.5 lime juice`, each on a line
 * @param input.items         the back bar
 * @param input.defaultUnit   what a number alone is taken for
 */
export function linesFromText(input: {
  readonly text: string;
  readonly items: readonly PastableIngredient[];
  readonly defaultUnit: AmountUnit;
}): PastedLine[] {
  return recipeRows(input.text).map((row) => lineFromRow({ ...input, row }));
}

function lineFromRow(input: {
  readonly row: string;
  readonly items: readonly PastableIngredient[];
  readonly defaultUnit: AmountUnit;
}): PastedLine {
  const { items, defaultUnit } = input;
  const stage = TOP.test(input.row) ? 'top' : 'mix';
  const row = input.row.replace(TOP, '');
  const { amountText, name } = splitRow({ row, defaultUnit });
  const ingredient =
    meantIngredient({ items, text: name }) ?? meantIngredient({ items, text: bareName(name) });
  return {
    ingredientId: ingredient?.id ?? null,
    amountText: withUnit({ amountText, ingredient, defaultUnit }).slice(0, MAX_AMOUNT_CHARACTERS),
    stage,
    note: ingredient === undefined ? name.slice(0, MAX_NOTE_CHARACTERS) : '',
  };
}

/** Without what is said in brackets or after a comma: `lime juice, fresh`. */
function bareName(name: string): string {
  return name
    .replace(/\([^)]*\)/g, ' ')
    .replace(/,.*$/, '')
    .replace(/^of /i, '')
    .trim();
}

function splitRow(input: { readonly row: string; readonly defaultUnit: AmountUnit }): {
  amountText: string;
  name: string;
} {
  const words = input.row.split(' ');
  const isAmount = (text: string): boolean => parseAmount(text, input).ok;
  const counts = Array.from(
    { length: Math.min(MOST_AMOUNT_WORDS, words.length) },
    (_, at) => at + 1,
  ).reverse();
  const first = counts.find((count) => isAmount(words.slice(0, count).join(' ')));
  if (first !== undefined) {
    return { amountText: words.slice(0, first).join(' '), name: words.slice(first).join(' ') };
  }
  const last = counts.find((count) => isAmount(words.slice(-count).join(' ')));
  if (last === undefined) return { amountText: '', name: input.row };
  const name = words
    .slice(0, -last)
    .join(' ')
    .replace(/[\s:–—-]+$/, '');
  return { amountText: words.slice(-last).join(' '), name };
}

function withUnit(input: {
  readonly amountText: string;
  readonly ingredient: PastableIngredient | undefined;
  readonly defaultUnit: AmountUnit;
}): string {
  const { amountText, ingredient, defaultUnit } = input;
  if (amountText === '') return '';
  const asPieces = parseAmount(amountText, { defaultUnit: 'piece' });
  const isCount =
    asPieces.ok &&
    asPieces.amount.unit === 'piece' &&
    Number.isInteger(asPieces.amount.value) &&
    asPieces.amount.value <= MOST_PIECES;
  const comesInPieces = ingredient !== undefined && ingredient.pieceMassG !== null;
  return amountTextWithUnit({
    text: amountText,
    defaultUnit: isCount && comesInPieces ? 'piece' : defaultUnit,
  });
}
