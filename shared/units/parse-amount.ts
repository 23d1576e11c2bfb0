/**
 * Reads an amount as people at a bar write it, and never guesses: what can be read in two ways is refused, with a
 * sentence that says what to write instead.
 */

import {
  AMOUNT_VALUE_RANGE,
  type Amount,
  type AmountUnit,
  SMALLEST_READABLE_VALUE,
  adviceForUnit,
  namesSeveralUnits,
  unitOfWord,
} from './amount-units.ts';

export type UnreadableAmount =
  | 'empty'
  | 'unreadable'
  | 'ambiguous-number'
  | 'not-positive'
  | 'too-small'
  | 'too-large'
  | 'divides-by-zero'
  | 'two-numbers'
  | 'two-units'
  | 'unknown-unit';

interface Refusal {
  readonly ok: false;
  readonly reason: UnreadableAmount;
  /** One sentence for a person: what is wrong, and what to write. */
  readonly detail: string;
}

export type ParsedAmount = { readonly ok: true; readonly amount: Amount } | Refusal;

type ReadNumber = { readonly ok: true; readonly value: number; readonly rest: string } | Refusal;

/** Longer than anything that is an amount. */
const MAX_CHARACTERS = 60;

const VULGAR_FRACTIONS = /[\u00bc-\u00be\u2150-\u215e\u2189]/g;
const SLASHES = /[\u2044\u2215]/g;
const HYPHENS = /[\u2010-\u2015\u2212]/g;

const MIXED_FRACTION = /^(\d+)(?: |-)(\d+) ?\/ ?(\d+)(?![\d.,/])/;
const FRACTION = /^(\d+) ?\/ ?(\d+)(?![\d.,/])/;
const DECIMAL = /^(?:\d+[.,]?\d*|[.,]\d+)(?![\d.,/])/;
const GROUPED_THOUSANDS = /^[1-9]\d{0,2},\d{3}$/;
const STARTS_LIKE_NUMBER = /^[.,]?\d/;

/**
 * Reads an amount with its unit.
 *
 * @param text                  such as `1 1/2 oz`, `¾`, `22,5 ml`, `2 dashes`, `5cl`, `30 g`
 * @param options.defaultUnit   what a number alone is taken for
 * @returns                     the amount as written, in the unit written, or why it cannot be read
 * Range:     0.001 to 10 000 of any unit; oz is the US fluid ounce
 */
export function parseAmount(text: string, options: { readonly defaultUnit: AmountUnit }): ParsedAmount {
  const plain = plainText(text);
  if (plain === '') return refuse('empty', 'Write an amount, such as 22.5 ml or 3/4 oz.');
  if (plain.length > MAX_CHARACTERS) return refuse('unreadable', 'This is too long to be an amount.');
  const number = readNumber(plain);
  if (!number.ok) return number;
  const unit = readUnit({ text: number.rest, defaultUnit: options.defaultUnit, whole: plain });
  if (typeof unit !== 'string') return unit;
  return checkValue({ value: number.value, unit });
}

/**
 * Writes the unit a text was read with behind it, when it had none: `1.5` in an ounce bar becomes `1.5 oz`.
 *
 * A draft is evaluated by people with other settings, so its texts should name their units.
 */
export function amountTextWithUnit(input: {
  readonly text: string;
  readonly defaultUnit: AmountUnit;
}): string {
  const number = readNumber(plainText(input.text));
  return number.ok && number.rest === '' ? `${input.text.trim()} ${input.defaultUnit}` : input.text;
}

/** Lower case, ASCII digits, slashes and hyphens, single spaces; `1½oz` becomes `1 1/2 oz`. */
function plainText(text: string): string {
  return text
    .replace(VULGAR_FRACTIONS, (fraction) => ` ${fraction.normalize('NFKC')} `)
    .normalize('NFKC')
    .replace(SLASHES, '/')
    .replace(HYPHENS, '-')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase();
}

function readNumber(text: string): ReadNumber {
  if (/^- ?[.,]?\d/.test(text))
    return refuse('not-positive', `“${text}” is less than nothing: an amount is more than 0.`);
  const mixed = MIXED_FRACTION.exec(text);
  if (mixed) return readFraction({ match: mixed, text });
  const fraction = FRACTION.exec(text);
  if (fraction) return readFraction({ match: fraction, text });
  const decimal = DECIMAL.exec(text)?.[0];
  if (decimal === undefined) return refuseNumber(text);
  if (GROUPED_THOUSANDS.test(decimal)) return refuseThousands(decimal);
  return { ok: true, value: Number(decimal.replace(',', '.')), rest: text.slice(decimal.length).trim() };
}

function readFraction(input: { readonly match: RegExpExecArray; readonly text: string }): ReadNumber {
  const [read, ...groups] = input.match;
  const [denominator = 0, numerator = 0, whole] = groups.map(Number).reverse();
  if (denominator === 0) return refuse('divides-by-zero', `“${read}” divides by nothing.`);
  if (whole !== undefined && (numerator === 0 || numerator >= denominator)) {
    return refuse(
      'unreadable',
      `“${read}” is not a whole number and a fraction: write it as one, such as 1 1/2.`,
    );
  }
  const value = ((whole ?? 0) * denominator + numerator) / denominator;
  return { ok: true, value, rest: input.text.slice(read.length).trim() };
}

function readUnit(input: {
  readonly text: string;
  readonly defaultUnit: AmountUnit;
  readonly whole: string;
}): AmountUnit | Refusal {
  const { text, whole } = input;
  if (text === '') return input.defaultUnit;
  const unit = unitOfWord(text);
  if (unit !== undefined) return unit;
  if (/^(?:-|to |or )? ?[.,]?\d/.test(text)) {
    return refuse('two-numbers', `“${whole}” has two numbers: write one amount, such as 1.5 oz or 1 1/2 oz.`);
  }
  if (/^e[+-]?\d/.test(text))
    return refuse('unreadable', `“${whole}” is not an amount: write the number in full.`);
  if (namesSeveralUnits(text) || /^[a-z].*\d/.test(text)) {
    return refuse('two-units', `“${whole}” is more than one amount: write one number and one unit.`);
  }
  if (/^[^a-z]/.test(text))
    return refuse('unreadable', `“${whole}” is not an amount: write it like 22.5 ml or 3/4 oz.`);
  const advice = adviceForUnit(text);
  return refuse(
    'unknown-unit',
    advice === undefined
      ? `“${text}” is not a unit: use ml, cl, oz, g, dash, bar spoon, drop, piece or part.`
      : `“${text}” is not a unit here: ${advice}.`,
  );
}

function checkValue(amount: Amount): ParsedAmount {
  const { value, unit } = amount;
  if (value <= AMOUNT_VALUE_RANGE.exclusiveMin) {
    return refuse('not-positive', 'An amount is more than nothing: to leave it out, remove the line.');
  }
  if (value < SMALLEST_READABLE_VALUE) {
    return refuse('too-small', `An amount is at least ${SMALLEST_READABLE_VALUE} ${unit}.`);
  }
  if (value > AMOUNT_VALUE_RANGE.max) {
    return refuse('too-large', `An amount is at most ${AMOUNT_VALUE_RANGE.max} ${unit}.`);
  }
  return { ok: true, amount };
}

function refuseNumber(text: string): Refusal {
  const unit = unitOfWord(text);
  if (unit !== undefined) return refuse('unreadable', `Write how many, such as 1 ${unit}.`);
  if (/^[\d.,]*[.,][\d.,]*[.,]/.test(text)) {
    return refuse(
      'ambiguous-number',
      `“${text}” has two separators: write thousands without one, such as 1000.5.`,
    );
  }
  if (STARTS_LIKE_NUMBER.test(text)) {
    return refuse('unreadable', `“${text}” is not a number: write it like 0.75 or 3/4.`);
  }
  return refuse(
    'unreadable',
    `“${text}” is not an amount: write a number and a unit, such as 22.5 ml or 3/4 oz.`,
  );
}

function refuseThousands(decimal: string): Refusal {
  const either = `${decimal.replace(',', '')} or ${decimal.replace(',', '.')}`;
  return refuse('ambiguous-number', `“${decimal}” can be read in two ways: write ${either}.`);
}

function refuse(reason: UnreadableAmount, detail: string): Refusal {
  return { ok: false, reason, detail };
}
