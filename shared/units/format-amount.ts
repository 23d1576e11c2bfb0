import type { Amount, AmountUnit } from './amount-units.ts';

/** More decimals than this are written as a fraction where there is an exact one. */
const MAX_DECIMALS = 4;
const MAX_DENOMINATOR = 64;

const PLURALS: Readonly<Partial<Record<AmountUnit, string>>> = {
  dash: 'dashes',
  'bar spoon': 'bar spoons',
  drop: 'drops',
  piece: 'pieces',
  part: 'parts',
};

/** The unit as it is written behind a number: `1 dash`, `2 dashes`. */
export function unitText(amount: Amount): string {
  return amount.value > 1 ? (PLURALS[amount.unit] ?? amount.unit) : amount.unit;
}

/**
 * Writes an amount so that `parseAmount` reads exactly the same again: nothing is rounded.
 *
 * A third of an ounce is written `1/3 oz`.
 * Range:     what `parseAmount` reads, 0.001 to 10 000 of any unit
 */
export function formatAmount(amount: Amount): string {
  return `${exactNumberText(amount.value)} ${unitText(amount)}`;
}

function exactNumberText(value: number): string {
  const decimal = String(value);
  const decimals = decimal.split('.')[1]?.length ?? 0;
  return decimals > MAX_DECIMALS ? (fractionText(value) ?? decimal) : decimal;
}

function fractionText(value: number): string | undefined {
  const whole = Math.floor(value);
  for (let denominator = 2; denominator <= MAX_DENOMINATOR; denominator += 1) {
    const numerator = Math.round((value - whole) * denominator);
    const isExact = (whole * denominator + numerator) / denominator === value;
    if (isExact && numerator > 0 && numerator < denominator) {
      return `${whole === 0 ? '' : `${whole} `}${numerator}/${denominator}`;
    }
  }
  return undefined;
}
