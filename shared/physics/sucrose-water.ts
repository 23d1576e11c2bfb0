/**
 * Sugar and water: density, degrees Brix, grams per litre, and what instruments read.
 *
 * w sucrose mass fraction [0 to 1]; degrees Brix = 100 w; c sugar concentration at 20 C [g/mL inside, g/L at the edge].
 * All sugars are counted as sucrose. Sources: icumsa-sps4, crc-concentrative, nbs-440, sugar-solubility (docs/sources/sugar.md).
 */
import { DomainError, requireWithin } from './domain-error.ts';
import { WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';

/** Mass fractions the density polynomial serves; above saturation (0.671 at 20 C) it is a supersaturated syrup. */
export const SUCROSE_MASS_FRACTION_RANGE = { min: 0, max: 0.85 } as const;

/** The same in degrees Brix. */
export const BRIX_RANGE = { min: 0, max: 85 } as const;

/** First row of the ICUMSA SPS-4 polynomial: c_0k [kg/m3], enough at 20 C. */
const [c1, c2, c3, c4, c5, c6] = [385.1761, 135.3705, 40.9299, -3.9643, 13.4853, -17.289] as const;

const PERCENT = 100;
const ML_PER_L = 1000;
/** Last Newton step of an inverse; what is left is of the order of its square. */
const MASS_FRACTION_TOLERANCE = 1e-8;

/**
 * Density at 20 C of a sugar solution, unchecked: for inner loops.
 *
 * Formula:   rho(w) = rho_water + sum c_0k w^k
 * @param sugarMassFraction   sugar mass per mass of solution [0 to 1]
 * @returns                   density at 20 C [g/mL]
 * Range:     0 <= sugarMassFraction <= 0.85; up to 1 it is a mere continuation, without a meaning of its own
 * Accuracy:  0.0002 g/mL to 60 °Brix, 0.0005 g/mL at 80 °Brix (against the CRC table)
 * Limits:    20 C only
 * Source:    ICUMSA SPS-4 polynomial
 * @example   sucroseDensityAt20(0.5) // 1.2297
 */
export function sucroseDensityAt20(sugarMassFraction: number): number {
  const w = sugarMassFraction;
  return WATER_DENSITY_G_PER_ML + (w * (c1 + w * (c2 + w * (c3 + w * (c4 + w * (c5 + w * c6)))))) / ML_PER_L;
}

function sucroseDensitySlopeAt20(w: number): number {
  return (c1 + w * (2 * c2 + w * (3 * c3 + w * (4 * c4 + w * (5 * c5 + w * 6 * c6))))) / ML_PER_L;
}

/** Density of the formula at w = 1 [g/mL]: nothing real, but the end of the bracket for every inverse. */
export const DRY_SUGAR_DENSITY_G_PER_ML = sucroseDensityAt20(1);

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
 * @example   densityOfSugarSolution(0.5) // 1.2297
 */
export function densityOfSugarSolution(sugarMassFraction: number): number {
  return sucroseDensityAt20(
    requireWithin({
      quantity: 'sugarMassFraction',
      value: sugarMassFraction,
      ...SUCROSE_MASS_FRACTION_RANGE,
    }),
  );
}

/** w for c to 0.002: a place to start, of no influence on the result. */
function firstGuess(c: number): number {
  return c * (0.9875 + c * (-0.3217 + c * 0.06536));
}

/** From within 0.002 three Newton steps reach the last bit; more are allowed. */
const MAX_NEWTON_STEPS = 20;

/** The w at which w rho(w) = c [g/mL]. It rises throughout, with a slope between 1 and 2.1: only nonsense does not converge. */
function sugarMassFractionAt20(cGPerMl: number): number {
  let w = firstGuess(cGPerMl);
  for (let steps = 0; steps < MAX_NEWTON_STEPS; steps += 1) {
    const density = sucroseDensityAt20(w);
    const step = (w * density - cGPerMl) / (density + w * sucroseDensitySlopeAt20(w));
    w -= step;
    if (Math.abs(step) <= MASS_FRACTION_TOLERANCE) return Math.min(1, Math.max(0, w));
  }
  throw new DomainError({
    quantity: 'sugarGPerMl',
    value: cGPerMl,
    min: 0,
    max: DRY_SUGAR_DENSITY_G_PER_ML,
  });
}

/** Density at 20 C with its slope against concentration. */
export interface DensityAtConcentration {
  readonly densityGPerMl: number;
  /** Change of density with concentration [g/mL for 1 g/mL]. */
  readonly slope: number;
}

/**
 * Density at 20 C of a sugar solution of known concentration, with its slope, unchecked: for inner loops.
 *
 * Formula:   rho(w(c)) and (drho/dw) / (dc/dw)
 * @param sugarGPerMl   sugar mass per volume of solution [g/mL]
 * @returns             density [g/mL] and its slope [g/mL for a change of concentration by 1 g/mL]
 * Range:     0 <= sugarGPerMl <= 1.55
 * Accuracy:  0.0002 g/mL to 770 g/L
 * Limits:    sucrose
 * Source:    ICUMSA SPS-4 polynomial
 * @example   densityAtConcentration(0.1038).densityGPerMl // 1.0381
 */
export function densityAtConcentration(sugarGPerMl: number): DensityAtConcentration {
  const w = sugarMassFractionAt20(sugarGPerMl);
  const densityGPerMl = sucroseDensityAt20(w);
  const slopeOfDensity = sucroseDensitySlopeAt20(w);
  return { densityGPerMl, slope: slopeOfDensity / (densityGPerMl + w * slopeOfDensity) };
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
  const w = requireWithin({ quantity: 'brix', value: brix, ...BRIX_RANGE }) / PERCENT;
  return ML_PER_L * w * sucroseDensityAt20(w);
}

/**
 * Degrees Brix of a solution of known sugar per litre.
 *
 * Formula:   100 w, with w the root of 1000 w rho(w) = c
 * @param sugarGPerL   sugar concentration at 20 C [g/L]
 * @returns            degrees Brix [g/100 g]
 * Range:     0 <= sugarGPerL <= 1231, which is 85 °Brix
 * Accuracy:  inverse of sugarGPerLFromBrix to 1e-10
 * Limits:    sugar and water only
 * Source:    definition of degrees Brix, with the ICUMSA density
 * @example   brixFromSugarGPerL(614.8) // 50.0
 */
export function brixFromSugarGPerL(sugarGPerL: number): number {
  const max = sugarGPerLFromBrix(BRIX_RANGE.max);
  const c = requireWithin({ quantity: 'sugarGPerL', value: sugarGPerL, min: 0, max });
  return PERCENT * sugarMassFractionAt20(c / ML_PER_L);
}
