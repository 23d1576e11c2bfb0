/** Units an amount may be written in. */
export const AMOUNT_UNITS = ['ml', 'cl', 'oz', 'g', 'dash', 'bar spoon', 'drop', 'piece', 'part'] as const;
export type AmountUnit = (typeof AMOUNT_UNITS)[number];

export interface Amount {
  readonly value: number;
  readonly unit: AmountUnit;
}

/** Limits of one line's amount, whatever its unit: more is a slip of the hand. */
export const AMOUNT_VALUE_RANGE = { exclusiveMin: 0, max: 10_000 } as const;
