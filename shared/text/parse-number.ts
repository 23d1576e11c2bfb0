export type ParsedNumber =
  | { readonly ok: true; readonly value: number }
  | {
      readonly ok: false;
      readonly reason: 'empty' | 'unreadable' | 'ambiguous' | 'below' | 'above';
      /** One sentence for a person: what is wrong, and what to write. */
      readonly detail: string;
    };

export interface NumberLimits {
  readonly min?: number;
  /** The number must be more than this. */
  readonly exclusiveMin?: number;
  readonly max?: number;
}

/** Longer than any number in a field. */
const MAX_CHARACTERS = 40;
const DECIMAL = /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)$/;
const SEVERAL_SEPARATORS = /^[+-]?\d[\d.,]*[.,]\d*[.,]\d*$/;
const GROUPED_THOUSANDS = /^[+-]?[1-9]\d{0,2},\d{3}$/;

/**
 * Reads what was typed into a numeric field. The decimal sign may be a point or a comma.
 *
 * @param text     the field's text; full-width digits and the real minus sign are understood
 * @param limits   what the field takes, in the field's own unit; all limits are included but `exclusiveMin`
 * @returns        the number, or why it cannot be used
 * Range:     finite numbers; `1,000` is refused since it can be read as 1000 or as 1
 */
export function parseNumber(text: string, limits: NumberLimits = {}): ParsedNumber {
  const plain = text
    .normalize('NFKC')
    .replace(/[\u2010-\u2015\u2212]/g, '-')
    .trim();
  if (plain === '') return { ok: false, reason: 'empty', detail: 'Write a number.' };
  if (SEVERAL_SEPARATORS.test(plain)) {
    const detail = `“${plain}” has two separators: write thousands without one, such as 1000.5.`;
    return { ok: false, reason: 'ambiguous', detail };
  }
  if (GROUPED_THOUSANDS.test(plain)) {
    const either = `${plain.replace(',', '')} or ${plain.replace(',', '.')}`;
    return { ok: false, reason: 'ambiguous', detail: `“${plain}” can be read in two ways: write ${either}.` };
  }
  if (plain.length > MAX_CHARACTERS || !DECIMAL.test(plain)) {
    const shown = plain.length > MAX_CHARACTERS ? 'This' : `“${plain}”`;
    return {
      ok: false,
      reason: 'unreadable',
      detail: `${shown} is not a number: write digits, such as 22.5.`,
    };
  }
  return checkLimits({ value: Number(plain.replace(',', '.')), limits });
}

function checkLimits(input: { readonly value: number; readonly limits: NumberLimits }): ParsedNumber {
  const { value } = input;
  const { min, exclusiveMin, max } = input.limits;
  if (exclusiveMin !== undefined && value <= exclusiveMin) {
    return {
      ok: false,
      reason: 'below',
      detail: `${value} is too low: it must be more than ${exclusiveMin}.`,
    };
  }
  if (min !== undefined && value < min) {
    return { ok: false, reason: 'below', detail: `${value} is too low: at least ${min}.` };
  }
  if (max !== undefined && value > max) {
    return { ok: false, reason: 'above', detail: `${value} is too high: at most ${max}.` };
  }
  return { ok: true, value: value === 0 ? 0 : value };
}
