/**
 * Sugar and water: density, degrees Brix, grams per litre, and syrups by ratio.
 *
 * w sucrose mass fraction [0 to 1]; degrees Brix = 100 w; c sugar concentration [g/L] at 20 C.
 * All sugars are counted as sucrose. Sources: icumsa-sps4, crc-concentrative, sugar-solubility (docs/sources/sugar.md).
 */
import { requireWithin } from './domain-error.ts';
import { WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';

/** Mass fractions the density polynomial serves; above saturation (0.671 at 20 C) it is a supersaturated syrup. */
export const SUCROSE_MASS_FRACTION_RANGE = { min: 0, max: 0.85 } as const;

/** Mass fraction of a saturated sucrose solution at 20 C (Sokolovsky 1958). */
export const SATURATED_SUCROSE_MASS_FRACTION = 0.6709;

/** Bulk density of granulated sugar in a measuring jug [g/mL]: from memory, common practice, ±0.05. */
export const GRANULATED_SUGAR_BULK_DENSITY_G_PER_ML = 0.85;

/** First row of the ICUMSA SPS-4 polynomial: c_0k [kg/m3], enough at 20 C. */
const ICUMSA_C0 = [385.1761, 135.3705, 40.9299, -3.9643, 13.4853, -17.289] as const;

const SOLVER_TOLERANCE = 1e-14;
const SOLVER_MAX_STEPS = 60;

/** Density at 20 C without checks, for the inner loops [g/mL]. */
export function sucroseDensityAt20(w: number): number {
  const [c1, c2, c3, c4, c5, c6] = ICUMSA_C0;
  return WATER_DENSITY_G_PER_ML + (w * (c1 + w * (c2 + w * (c3 + w * (c4 + w * (c5 + w * c6)))))) / 1000;
}

/**
 * Density at 20 C of a sugar solution.
 *
 * Formula:   rho(w) = rho_water + sum c_0k w^k
 * @param sugarMassFraction   sugar mass per mass of solution [0 to 0.85]
 * @returns                   density at 20 C [g/mL]
 * Range:     0 <= sugarMassFraction <= 0.85
 * Accuracy:  0.0002 g/mL to 60 °Brix, 0.0005 g/mL at 80 °Brix (against the CRC table)
 * Limits:    sucrose; glucose is 0.0013 g/mL lighter at 20 %, fructose 0.0006 denser
 * Source:    ICUMSA SPS-4 polynomial
 * @example   densityOfSugarSolution(0.5) // 1.2296
 */
export function densityOfSugarSolution(sugarMassFraction: number): number {
  const w = requireWithin({
    quantity: 'sugarMassFraction',
    value: sugarMassFraction,
    ...SUCROSE_MASS_FRACTION_RANGE,
  });
  return sucroseDensityAt20(w);
}

/**
 * Sugar per litre of a solution of known degrees Brix.
 *
 * Formula:   c = 1000 * w * rho(w)
 * @param brix   degrees Brix: grams of sugar in 100 g [0 to 85]
 * @returns      sugar concentration at 20 C [g/L]
 * Range:     0 <= brix <= 85
 * Accuracy:  0.05 %
 * Limits:    sugar and water only; with alcohol a refractometer's reading is not a sugar content
 * Source:    definition of degrees Brix, with the ICUMSA density
 * @example   sugarGPerLFromBrix(50) // 614.8
 */
export function sugarGPerLFromBrix(brix: number): number {
  const w = brix / 100;
  return 1000 * w * densityOfSugarSolution(w);
}

/**
 * Degrees Brix of a solution of known sugar per litre.
 *
 * Formula:   100 w, with w the root of 1000 w rho(w) = c
 * @param sugarGPerL   sugar concentration at 20 C [g/L]
 * @returns            degrees Brix [g/100 g]
 * Range:     0 <= sugarGPerL <= 1228, which is 85 °Brix
 * Accuracy:  inverse of sugarGPerLFromBrix to 1e-10
 * Limits:    sugar and water only
 * Source:    definition of degrees Brix, with the ICUMSA density
 * @example   brixFromSugarGPerL(614.8) // 50.0
 */
export function brixFromSugarGPerL(sugarGPerL: number): number {
  const max = sugarGPerLFromBrix(100 * SUCROSE_MASS_FRACTION_RANGE.max);
  const c = requireWithin({ quantity: 'sugarGPerL', value: sugarGPerL, min: 0, max });
  return 100 * sugarMassFractionAt20(c);
}

/** The inverse without a check; c rises with w throughout, and 0 to 1 brackets every concentration allowed. */
export function sugarMassFractionAt20(sugarGPerL: number): number {
  let low = 0;
  let high = 1;
  let w = sugarGPerL / (998 + 0.38 * sugarGPerL);
  for (let step = 0; step < SOLVER_MAX_STEPS; step += 1) {
    const rho = sucroseDensityAt20(w);
    const excess = 1000 * w * rho - sugarGPerL;
    if (excess > 0) high = w;
    else low = w;
    let next = w - excess / (1000 * (rho + w * sucroseDensitySlopeAt20(w)));
    if (!(next >= low && next <= high)) next = (low + high) / 2;
    if (Math.abs(next - w) <= SOLVER_TOLERANCE) return next;
    w = next;
  }
  return w;
}

function sucroseDensitySlopeAt20(w: number): number {
  const [c1, c2, c3, c4, c5, c6] = ICUMSA_C0;
  return (c1 + w * (2 * c2 + w * (3 * c3 + w * (4 * c4 + w * (5 * c5 + w * 6 * c6))))) / 1000;
}

/**
 * Degrees Brix of a syrup made by weighing sugar and water.
 *
 * Formula:   100 * r / (1 + r)
 * @param sugarToWaterRatio   sugar mass per water mass, 2 for a 2:1 syrup [0 to 5.5]
 * @returns                   degrees Brix [g/100 g]
 * Range:     0 <= sugarToWaterRatio <= 5.5
 * Accuracy:  exact, if nothing boils away
 * Limits:    above 2.04 the sugar does not all dissolve at 20 C
 * Source:    mass balance
 * @example   brixFromRatioByMass(2) // 66.67
 */
export function brixFromRatioByMass(sugarToWaterRatio: number): number {
  const r = requireWithin({ quantity: 'sugarToWaterRatio', value: sugarToWaterRatio, min: 0, max: 5.5 });
  return (100 * r) / (1 + r);
}

/**
 * Degrees Brix of a syrup made by measuring granulated sugar and water in a jug.
 *
 * Formula:   m_s = r * 0.85, m_w = 0.9982, Brix = 100 m_s / (m_s + m_w)
 * @param sugarToWaterRatio   sugar volume per water volume [0 to 6]
 * @returns                   degrees Brix [g/100 g]
 * Range:     0 <= sugarToWaterRatio <= 6
 * Accuracy:  ±2 °Brix: bulk density varies with the grain and the hand
 * Limits:    granulated white sugar; caster sugar packs more densely
 * Source:    mass balance with a bulk density from memory (common practice)
 * @example   brixFromRatioByVolume(1) // 45.99
 */
export function brixFromRatioByVolume(sugarToWaterRatio: number): number {
  const r = requireWithin({ quantity: 'sugarToWaterRatio', value: sugarToWaterRatio, min: 0, max: 6 });
  const sugarG = r * GRANULATED_SUGAR_BULK_DENSITY_G_PER_ML;
  return (100 * sugarG) / (sugarG + WATER_DENSITY_G_PER_ML);
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
  const w = requireWithin({ quantity: 'brix', value: brix, min: 0, max: 85 }) / 100;
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
