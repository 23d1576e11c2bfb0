/**
 * Syrups by ratio: from sugar and water by weight or in a jug to degrees Brix, back again, and what dissolves.
 *
 * r ratio of sugar to water; w sucrose mass fraction; degrees Brix = 100 w. Mass is conserved and nothing boils away.
 * Sources: sugar-solubility, sugar-bulk-density (docs/sources/sugar.md).
 */
import { requireWithin } from './domain-error.ts';
import { WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';
import { BRIX_RANGE } from './sucrose-water.ts';

/** Bulk density of granulated sugar in a measuring jug [g/mL]: from memory, common practice, ±0.05. */
export const GRANULATED_SUGAR_BULK_DENSITY_G_PER_ML = 0.85;

/** Ratios of sugar to water that a person may ask for, by mass or by volume. */
export const SUGAR_TO_WATER_RANGE = { min: 0, max: 5.5 } as const;

const PERCENT = 100;

/** Saturated sucrose: temperature [C] and mass percent. Sokolovsky 1958, in Mohos 2010, table A2.3. */
const SATURATION = [
  [0, 64.18],
  [5, 64.87],
  [10, 65.58],
  [15, 66.53],
  [20, 67.09],
  [25, 67.89],
  [30, 68.8],
] as const;

/** Temperatures of the solubility table [C]. */
export const SATURATION_TEMPERATURE_RANGE_C = { min: 0, max: 30 } as const;

/**
 * Degrees Brix of a syrup made by weighing sugar and water.
 *
 * Formula:   100 * r / (1 + r)
 * @param sugarToWaterRatio   sugar mass per water mass, 2 for a 2:1 syrup [g/g]
 * @returns                   degrees Brix [g/100 g]
 * Range:     0 <= sugarToWaterRatio <= 5.5
 * Accuracy:  exact, if nothing boils away
 * Limits:    above 2.04 the sugar does not all dissolve at 20 C
 * Source:    mass balance
 * @example   brixFromRatioByMass(2) // 66.67
 */
export function brixFromRatioByMass(sugarToWaterRatio: number): number {
  const r = requireWithin({
    quantity: 'sugarToWaterRatio',
    value: sugarToWaterRatio,
    ...SUGAR_TO_WATER_RANGE,
  });
  return (PERCENT * r) / (1 + r);
}

/**
 * Degrees Brix of a syrup made by measuring granulated sugar and water in a jug.
 *
 * Formula:   m_s = 0.85 r, m_w = 0.9982, Brix = 100 m_s / (m_s + m_w)
 * @param sugarToWaterRatio   sugar volume per water volume [mL/mL]
 * @returns                   degrees Brix [g/100 g]
 * Range:     0 <= sugarToWaterRatio <= 5.5
 * Accuracy:  ±2 °Brix: bulk density varies with the grain and the hand
 * Limits:    granulated white sugar; caster sugar packs more densely
 * Source:    mass balance with a bulk density from memory (common practice)
 * @example   brixFromRatioByVolume(1) // 45.99
 */
export function brixFromRatioByVolume(sugarToWaterRatio: number): number {
  const r = requireWithin({
    quantity: 'sugarToWaterRatio',
    value: sugarToWaterRatio,
    ...SUGAR_TO_WATER_RANGE,
  });
  const sugarG = r * GRANULATED_SUGAR_BULK_DENSITY_G_PER_ML;
  return (PERCENT * sugarG) / (sugarG + WATER_DENSITY_G_PER_ML);
}

/**
 * The ratio by mass that makes a syrup of known degrees Brix.
 *
 * Formula:   r = w / (1 - w)
 * @param brix   degrees Brix [0 to 85]
 * @returns      sugar mass per water mass [g/g]
 * Range:     0 <= brix <= 85
 * Accuracy:  exact
 * Limits:    none
 * Source:    mass balance
 * @example   ratioByMassFromBrix(50) // 1.00
 */
export function ratioByMassFromBrix(brix: number): number {
  const w = requireWithin({ quantity: 'brix', value: brix, ...BRIX_RANGE }) / PERCENT;
  return w / (1 - w);
}

/**
 * The ratio by volume of granulated sugar to water that makes a syrup of known degrees Brix.
 *
 * Formula:   r = (w / 0.85) / ((1 - w) / 0.9982)
 * @param brix   degrees Brix [0 to 85]
 * @returns      sugar volume per water volume [mL/mL]
 * Range:     0 <= brix <= 85
 * Accuracy:  ±6 %: bulk density varies with the grain and the hand
 * Limits:    granulated white sugar
 * Source:    mass balance with a bulk density from memory (common practice)
 * @example   ratioByVolumeFromBrix(46) // 1.00
 */
export function ratioByVolumeFromBrix(brix: number): number {
  return (ratioByMassFromBrix(brix) * WATER_DENSITY_G_PER_ML) / GRANULATED_SUGAR_BULK_DENSITY_G_PER_ML;
}

/**
 * Degrees Brix at which a sucrose syrup is saturated.
 *
 * Formula:   linear between the rows of the table
 * @param temperatureC   temperature of the syrup [C]
 * @returns              degrees Brix of the saturated syrup [g/100 g]
 * Range:     0 <= temperatureC <= 30
 * Accuracy:  0.1 °Brix at the rows
 * Limits:    pure sucrose; invert sugar and acid keep more in solution
 * Source:    Sokolovsky 1958, in Mohos 2010, table A2.3
 * @example   saturatedBrix(20) // 67.09
 */
export function saturatedBrix(temperatureC: number): number {
  const t = requireWithin({
    quantity: 'temperatureC',
    value: temperatureC,
    ...SATURATION_TEMPERATURE_RANGE_C,
  });
  const upper = SATURATION.find(([rowC]) => rowC >= t) ?? SATURATION[SATURATION.length - 1]!;
  const lower = SATURATION.findLast(([rowC]) => rowC <= t) ?? SATURATION[0];
  if (upper[0] === lower[0]) return upper[1];
  return lower[1] + ((upper[1] - lower[1]) * (t - lower[0])) / (upper[0] - lower[0]);
}
