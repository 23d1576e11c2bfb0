/**
 * What instruments for sugar read. Each reading is a sugar content only while there is no alcohol: ethanol makes a
 * refractometer read high and a hydrometer read low. Hence `apparent` in every name.
 *
 * S specific gravity 20/20 [1], n refractive index at 589.3 nm and 20 C [1]. Sources: nbs-440, icumsa-refraction,
 * oiv-refraction (docs/sources/sugar.md).
 */
import { requireWithin } from './domain-error.ts';

/** 0 to 40 °Brix, the range of the fit [1]. */
export const SPECIFIC_GRAVITY_RANGE = { min: 1, max: 1.17874 } as const;

/** 0 to 85 °Brix [1]. */
export const REFRACTIVE_INDEX_RANGE = { min: 1.33299, max: 1.504 } as const;

const SPECIFIC_GRAVITY_FIT = [-669.5622, 1262.7794, -775.6821, 182.4601] as const;
const REFRACTIVE_INDEX_FIT = [-99127.4536, 318417.95, -413145.8, 270177.93, -88885.21, 11758.74] as const;

/** a_0 + a_1 x + a_2 x^2 + … */
function polynomial(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}

/**
 * Degrees Brix that a hydrometer's specific gravity stands for.
 *
 * Formula:   182.4601 S^3 - 775.6821 S^2 + 1262.7794 S - 669.5622
 * @param specificGravity   apparent specific gravity 20/20 [1]
 * @returns                 apparent degrees Brix [g/100 g]
 * Range:     1 <= specificGravity <= 1.17874
 * Accuracy:  0.001 °Brix against NBS Circular 440
 * Limits:    sugar and water only: ethanol lowers the density, and the reading with it
 * Source:    fit to NBS Circular 440, read at liquisearch.com/brix/tables
 * @example   apparentBrixFromSpecificGravity(1.04003) // 10.0
 */
export function apparentBrixFromSpecificGravity(specificGravity: number): number {
  const S = requireWithin({ quantity: 'specificGravity', value: specificGravity, ...SPECIFIC_GRAVITY_RANGE });
  return polynomial(SPECIFIC_GRAVITY_FIT, S);
}

/**
 * Degrees Brix that a refractometer shows.
 *
 * Formula:   ((((11758.74 n - 88885.21) n + 270177.93) n - 413145.80) n + 318417.95) n - 99127.4536
 * @param refractiveIndex   refractive index at 589.3 nm and 20 C [1]
 * @returns                 apparent degrees Brix [g/100 g]
 * Range:     1.33299 <= refractiveIndex <= 1.504
 * Accuracy:  0.03 °Brix against the OIV table, 0.07 °Brix against the CRC table as printed
 * Limits:    sugar and water only: 40 % vol of ethanol without any sugar reads as 15 °Brix
 * Source:    fit to the ICUMSA table, read at liquisearch.com/brix/tables
 * @example   apparentBrixFromRefractiveIndex(1.36384) // 20.0
 */
export function apparentBrixFromRefractiveIndex(refractiveIndex: number): number {
  const n = requireWithin({ quantity: 'refractiveIndex', value: refractiveIndex, ...REFRACTIVE_INDEX_RANGE });
  return polynomial(REFRACTIVE_INDEX_FIT, n);
}
