import { formatTrimmed } from './format-number.ts';
import type { VolumeUnit } from './format-quantity.ts';
import { type Amount, formatAmount } from '../units/amount.ts';
import { ML_PER_CENTILITRE, ML_PER_FLUID_OUNCE } from '../units/measure-amount.ts';

const ALMOST = '≈';
/** Ounces this near, relative, to a jigger's mark are shown at the mark: a metric ounce of 30 mL is 1.44 % over. */
const MARK_TOLERANCE = 0.015;
/** Larger amounts than this are measured out, not poured by the jigger [oz]. */
const MAX_MARK_OZ = 8;
/** Jiggers are marked in quarters; in fractions people read eighths too. */
const DECIMAL_MARKS_PER_OUNCE = 4;
const FRACTION_MARKS_PER_OUNCE = 8;
/** Closer than this, relative, the shown number is the amount itself. */
const EXACT_TOLERANCE = 1e-9;
const SMALL_OUNCE_DECIMALS = 2;
const LARGE_OUNCE_DECIMALS = 1;
const ML_DECIMALS = 1;

/**
 * An amount for a person who reads the other volume unit: `≈ 0.75 oz` for 22.5 ml, `≈ 22.2 ml` for 0.75 oz.
 *
 * Only ml, cl and oz are changed; a dash stays a dash, a gram a gram. What is not exact is marked with ≈.
 * @param amount              the amount as written
 * @param unit                the unit to read it in
 * @param options.fractions   write ounces as 3/4 rather than 0.75
 */
export function showAmountIn(
  amount: Amount,
  unit: VolumeUnit,
  options: { readonly fractions?: boolean } = {},
): string {
  if (unit === 'ml') return showInMl(amount);
  const volumeMl = millilitresOf(amount);
  const inFractions = options.fractions ?? false;
  if (volumeMl !== undefined) return showOunces({ ounces: volumeMl / ML_PER_FLUID_OUNCE, inFractions });
  const eighths = amount.value * FRACTION_MARKS_PER_OUNCE;
  const isInEighths = amount.unit === 'oz' && inFractions && Number.isInteger(eighths);
  return isInEighths ? `${eighthsText(eighths)} oz` : formatAmount(amount);
}

function millilitresOf(amount: Amount): number | undefined {
  if (amount.unit === 'ml') return amount.value;
  return amount.unit === 'cl' ? amount.value * ML_PER_CENTILITRE : undefined;
}

function showInMl(amount: Amount): string {
  const volumeMl = amount.unit === 'oz' ? amount.value * ML_PER_FLUID_OUNCE : millilitresOf(amount);
  if (volumeMl === undefined || amount.unit === 'ml') return formatAmount(amount);
  return marked({ exact: volumeMl, shown: roundTo({ value: volumeMl, decimals: ML_DECIMALS }), unit: 'ml' });
}

function showOunces(input: { readonly ounces: number; readonly inFractions: boolean }): string {
  const { ounces, inFractions } = input;
  const marks = inFractions ? FRACTION_MARKS_PER_OUNCE : DECIMAL_MARKS_PER_OUNCE;
  const nearest = Math.round(ounces * marks);
  const isAtMark = ounces <= MAX_MARK_OZ && Math.abs(nearest / marks - ounces) <= MARK_TOLERANCE * ounces;
  if (!isAtMark) {
    const decimals = ounces <= MAX_MARK_OZ ? SMALL_OUNCE_DECIMALS : LARGE_OUNCE_DECIMALS;
    return marked({ exact: ounces, shown: roundTo({ value: ounces, decimals }), unit: 'oz' });
  }
  const number = inFractions ? eighthsText(nearest) : undefined;
  return marked({ exact: ounces, shown: nearest / marks, number, unit: 'oz' });
}

function marked(input: {
  readonly exact: number;
  readonly shown: number;
  readonly number?: string | undefined;
  readonly unit: VolumeUnit;
}): string {
  const isExact = Math.abs(input.shown - input.exact) <= EXACT_TOLERANCE * input.exact;
  const number = input.number ?? formatTrimmed({ value: input.shown, decimals: 3 });
  return `${isExact ? '' : `${ALMOST} `}${number} ${input.unit}`;
}

/** `3/4`, `1 1/2`, `2` from a number of eighths. */
function eighthsText(eighths: number): string {
  const whole = Math.floor(eighths / FRACTION_MARKS_PER_OUNCE);
  let numerator = eighths % FRACTION_MARKS_PER_OUNCE;
  let denominator = FRACTION_MARKS_PER_OUNCE;
  while (numerator > 0 && numerator % 2 === 0) {
    numerator /= 2;
    denominator /= 2;
  }
  const parts = [whole > 0 ? String(whole) : '', numerator > 0 ? `${numerator}/${denominator}` : ''];
  return parts.filter((part) => part !== '').join(' ');
}

/** Rounded, but never to nothing: a small amount keeps its first two digits. */
function roundTo(input: { readonly value: number; readonly decimals: number }): number {
  const rounded = Number(input.value.toFixed(input.decimals));
  return rounded > 0 ? rounded : Number(input.value.toPrecision(2));
}

/** Digits that an amount is worked out to: a twentieth of a per cent, finer than any jigger or bar scale. */
const AMOUNT_DIGITS = 4;

/** A computed amount with the digits that people can use: 16.0714 ml becomes 16.07 ml. */
export function roundedAmount(amount: Amount): Amount {
  return { value: Number(amount.value.toPrecision(AMOUNT_DIGITS)), unit: amount.unit };
}
