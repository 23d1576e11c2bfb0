/**
 * How far a verified serving measure may be off by law: the smallest error that a poured drink must be expected to have.
 *
 * V nominal volume of the measure [mL]. Only line measures poured from (transfer measures) are here; a free pour is worse.
 * Source id: oiml-r138 (docs/sources/measures.md).
 */
import { requireNotNegative } from './domain-error.ts';

/** From this volume on the error is relative [mL]. */
const RELATIVE_FROM_ML = 100;
const SMALL_MEASURE_ML = 2;
const LARGE_MEASURE_FRACTION = 0.03;

/**
 * Largest error that a line measure may have.
 *
 * Formula:   2 mL below 100 mL, 0.03 V from 100 mL on
 * @param volumeMl   nominal volume of the measure [mL]
 * @returns          error in either direction [mL]
 * Range:     volumeMl >= 0
 * Accuracy:  as printed
 * Limits:    of the measure alone, filled to its line by a steady hand; brim measures and free pours are other
 * Source:    OIML R 138:2007, section 5, transfer measures
 * @example   lineMeasureToleranceMl(200) // 6
 */
export function lineMeasureToleranceMl(volumeMl: number): number {
  const nominalMl = requireNotNegative({ quantity: 'volumeMl', value: volumeMl });
  return nominalMl < RELATIVE_FROM_ML ? SMALL_MEASURE_ML : LARGE_MEASURE_FRACTION * nominalMl;
}
