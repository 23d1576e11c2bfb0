import type { HouseMeasures } from './house-measures.ts';

/** Units an amount may be written in. */
export const AMOUNT_UNITS = ['ml', 'cl', 'oz', 'g', 'dash', 'bar spoon', 'drop', 'piece', 'part'] as const;
export type AmountUnit = (typeof AMOUNT_UNITS)[number];

export interface Amount {
  readonly value: number;
  readonly unit: AmountUnit;
}

/** Limits of one line's amount, whatever its unit: more is a slip of the hand. */
export const AMOUNT_VALUE_RANGE = { exclusiveMin: 0, max: 10_000 } as const;

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

export type ParsedAmount =
  | { readonly ok: true; readonly amount: Amount }
  | { readonly ok: false; readonly reason: UnreadableAmount; readonly detail: string };

export type AmountMeasure =
  | { readonly kind: 'volume'; readonly volumeMl: number }
  | { readonly kind: 'mass'; readonly massG: number }
  | { readonly kind: 'pieces'; readonly pieces: number };

export function parseAmount(_text: string, _options: { readonly defaultUnit: AmountUnit }): ParsedAmount {
  throw new Error('being written');
}
/** The text with the unit it was read with, when it had none: `1.5` in an ounce bar becomes `1.5 oz`. */
export function amountTextWithUnit(_input: {
  readonly text: string;
  readonly defaultUnit: AmountUnit;
}): string {
  throw new Error('being written');
}
export function formatAmount(_amount: Amount): string {
  throw new Error('being written');
}
/** The amount read in ml or oz, marked with ≈ when it is not exact; others than ml, cl and oz as they are. */
export function showAmountIn(
  _amount: Amount,
  _unit: 'ml' | 'oz',
  _options: { readonly fractions?: boolean } = {},
): string {
  throw new Error('being written');
}
export function measureOfAmount(_input: {
  readonly amount: Amount;
  readonly houseMeasures: HouseMeasures;
  readonly partMl: number;
}): AmountMeasure {
  throw new Error('being written');
}
