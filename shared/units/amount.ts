/** Amounts: what may be written, how it is read, written again and measured. */

export { AMOUNT_UNITS, AMOUNT_VALUE_RANGE, SMALLEST_READABLE_VALUE } from './amount-units.ts';
export type { Amount, AmountUnit } from './amount-units.ts';
export { amountTextWithUnit, parseAmount } from './parse-amount.ts';
export type { ParsedAmount, UnreadableAmount } from './parse-amount.ts';
export { formatAmount, unitText } from './format-amount.ts';
export { measureOfAmount } from './measure-amount.ts';
export type { AmountMeasure } from './measure-amount.ts';
