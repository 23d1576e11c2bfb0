/**
 * Measures that the trade uses and no standard defines: each team sets what one of them holds.
 *
 * The defaults and ranges are common practice: they vary with the bottle, its fill level and the hand.
 */

export interface HouseMeasures {
  /** One dash from a dasher bottle [mL]. */
  readonly dashMl: number;
  /** One bar spoon, level [mL]. */
  readonly barSpoonMl: number;
  /** One drop from a dropper [mL]. */
  readonly dropMl: number;
}

/** Common practice, no standard. */
export const DEFAULT_HOUSE_MEASURES: HouseMeasures = { dashMl: 0.8, barSpoonMl: 5, dropMl: 0.05 };

/** What a team may set [mL]; wider than common practice (dash 0.6 to 1.6, bar spoon 2.5 to 5, drop 0.024 to 0.06). */
export const HOUSE_MEASURE_RANGES = {
  dashMl: { min: 0.2, max: 2 },
  barSpoonMl: { min: 1, max: 15 },
  dropMl: { min: 0.01, max: 0.2 },
} as const;
