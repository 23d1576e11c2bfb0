/**
 * Ethanol and water: density at any strength and temperature, and the way between mass and volume fraction.
 *
 * p ethanol mass fraction [0 to 1], q ethanol volume fraction at 20 C [0 to 1], t temperature [C], rho density.
 * Strength is always referred to 20 C. Sources: oiml-r22 (docs/sources/alcoholometry.md).
 */
import { R22_A, R22_B, R22_C } from './data/oiml-r22.ts';
import { DomainError, requireWithin } from './domain-error.ts';
import { solveIncreasing, type ValueAndSlope } from './solve-increasing.ts';

/** Temperatures for which the formula was fitted, above the freezing line [C]. */
export const R22_TEMPERATURE_RANGE_C = { min: -20, max: 40 } as const;

const G_PER_ML = 1 / 1000;
const REFERENCE_C = 20;
/** Last Newton step of an inverse; what is left is of the order of its square. */
const MASS_FRACTION_TOLERANCE = 1e-8;

/** a_0 + a_1 x + a_2 x^2 + … */
function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let index = coefficients.length - 1; index >= 0; index -= 1)
    sum = sum * x + (coefficients[index] ?? 0);
  return sum;
}

/** A_1 to A_12 by position, written out: it runs some thirty times for every line of every keystroke. */
const [A1, A2, A3, A4, A5, A6, A7, A8, A9, A10, A11, A12] = R22_A;

function upperTerms(p: number): number {
  return A6 + p * (A7 + p * (A8 + p * (A9 + p * (A10 + p * (A11 + p * A12)))));
}

function densityAt20(p: number): number {
  return (A1 + p * (A2 + p * (A3 + p * (A4 + p * (A5 + p * upperTerms(p)))))) * G_PER_ML;
}

function upperSlopeTerms(p: number): number {
  return 5 * A6 + p * (6 * A7 + p * (7 * A8 + p * (8 * A9 + p * (9 * A10 + p * (10 * A11 + p * 11 * A12)))));
}

function densitySlopeAt20(p: number): number {
  return (A2 + p * (2 * A3 + p * (3 * A4 + p * (4 * A5 + p * upperSlopeTerms(p))))) * G_PER_ML;
}

/** Density of pure ethanol at 20 C: the formula at p = 1, 0.7892391 [g/mL]. */
export const ETHANOL_DENSITY_G_PER_ML = densityAt20(1);

/** Density of water at 20 C in OIML R 22 [g/mL]; 6 ppm below the CIPM value, kept so that joins are exact. */
export const WATER_DENSITY_G_PER_ML = densityAt20(0);

/**
 * Density of a mixture of ethanol and water.
 *
 * Formula:   rho(p,t) = A_1 + sum A_k p^(k-1) + sum B_k (t-20)^k + sum sum C_i,k p^k (t-20)^i
 * @param input.ethanolMassFraction   ethanol mass per mass of mixture [0 to 1]
 * @param input.temperatureC          temperature of the liquid [C]
 * @returns                           density [g/mL]
 * Range:     0 <= ethanolMassFraction <= 1, -20 <= temperatureC <= 40
 * Accuracy:  0.00001 g/mL against the printed tables
 * Limits:    below the freezing line the value is that of a liquid that would not be there
 * Source:    OIML R 22 (1975), general formula
 * @example   densityOfEthanolWater({ ethanolMassFraction: 0.3, temperatureC: -20 }) // 0.97491
 */
export function densityOfEthanolWater(input: { ethanolMassFraction: number; temperatureC: number }): number {
  const p = requireWithin({
    quantity: 'ethanolMassFraction',
    value: input.ethanolMassFraction,
    min: 0,
    max: 1,
  });
  const t = requireWithin({
    quantity: 'temperatureC',
    value: input.temperatureC,
    ...R22_TEMPERATURE_RANGE_C,
  });
  const offset = t - REFERENCE_C;
  let rho = polynomial(R22_A, p) + offset * polynomial(R22_B, offset);
  R22_C.forEach((row, index) => {
    rho += p * polynomial(row, p) * offset ** (index + 1);
  });
  return rho * G_PER_ML;
}

/**
 * Density at 20 C of a mixture of ethanol and water, unchecked: for inner loops.
 *
 * Formula:   rho(p) = A_1 + sum A_k p^(k-1)
 * @param ethanolMassFraction   ethanol mass per mass of mixture [0 to 1]
 * @returns                     density at 20 C [g/mL]
 * Range:     0 <= ethanolMassFraction <= 1, which is not checked
 * Accuracy:  0.00001 g/mL against the printed tables
 * Limits:    20 C only
 * Source:    OIML R 22 (1975), general formula
 * @example   ethanolWaterDensityAt20(0.5) // 0.91377
 */
export function ethanolWaterDensityAt20(ethanolMassFraction: number): number {
  return densityAt20(ethanolMassFraction);
}

/**
 * Ethanol volume fraction at 20 C of a mixture of known mass fraction.
 *
 * Formula:   q = p * rho(p, 20) / rho(1, 20)
 * @param ethanolMassFraction   ethanol mass per mass of mixture [0 to 1]
 * @returns                     ethanol volume fraction at 20 C [0 to 1]
 * Range:     0 <= ethanolMassFraction <= 1
 * Accuracy:  0.0001 against the printed tables
 * Limits:    water and ethanol only
 * Source:    OIML R 22 (1975), Table II
 * @example   volumeFractionFromMassFraction(0.1) // 0.1244
 */
export function volumeFractionFromMassFraction(ethanolMassFraction: number): number {
  const p = requireWithin({ quantity: 'ethanolMassFraction', value: ethanolMassFraction, min: 0, max: 1 });
  return (p * densityAt20(p)) / ETHANOL_DENSITY_G_PER_ML;
}

/**
 * Ethanol mass fraction of a mixture of known volume fraction at 20 C.
 *
 * Formula:   the p that solves q = p * rho(p, 20) / rho(1, 20)
 * @param ethanolVolumeFraction   ethanol volume fraction at 20 C [0 to 1]
 * @returns                       ethanol mass per mass of mixture [0 to 1]
 * Range:     0 <= ethanolVolumeFraction <= 1
 * Accuracy:  inverse of volumeFractionFromMassFraction to 1e-12
 * Limits:    water and ethanol only
 * Source:    OIML R 22 (1975), Table III
 * @example   massFractionFromVolumeFraction(0.5) // 0.4243
 */
export function massFractionFromVolumeFraction(ethanolVolumeFraction: number): number {
  const q = requireWithin({
    quantity: 'ethanolVolumeFraction',
    value: ethanolVolumeFraction,
    min: 0,
    max: 1,
  });
  return massFractionAt20(q);
}

/** p for q to 0.004: a place to start, of no influence on the result. */
function firstGuess(q: number): number {
  return q * (0.7813 + q * (0.1582 + q * (-0.1457 + q * 0.2024)));
}

/** From within 0.004 three Newton steps reach the last bit; more are allowed. */
const MAX_NEWTON_STEPS = 20;

/**
 * The same without a check. q(p) rises throughout from q(0) = 0 to q(1) = 1, with a slope between 0.6 and 1.3, so there is one
 * root and Newton steps from nearby find it. Only nonsense does not converge.
 */
function massFractionAt20(q: number): number {
  let p = firstGuess(q);
  for (let steps = 0; steps < MAX_NEWTON_STEPS; steps += 1) {
    const density = densityAt20(p);
    const excess = p * density - q * ETHANOL_DENSITY_G_PER_ML;
    const step = excess / (density + p * densitySlopeAt20(p));
    p -= step;
    if (Math.abs(step) <= MASS_FRACTION_TOLERANCE) return Math.min(1, Math.max(0, p));
  }
  throw new DomainError({ quantity: 'ethanolVolumeFraction', value: q, min: 0, max: 1 });
}

/** Density at 20 C with its slope against strength. */
export interface DensityAtStrength {
  readonly densityGPerMl: number;
  /** Change of density with volume fraction [g/mL for 1]. */
  readonly slopeGPerMl: number;
}

/**
 * Density at 20 C of a mixture of known strength, with its slope, unchecked: for inner loops.
 *
 * Formula:   rho(p(q)) and (drho/dp) / (dq/dp)
 * @param ethanolVolumeFraction   ethanol volume fraction at 20 C [0 to 1]
 * @returns                       density [g/mL] and its slope [g/mL for a change of strength by 1]
 * Range:     0 <= ethanolVolumeFraction <= 1
 * Accuracy:  0.00001 g/mL against the printed tables
 * Limits:    water and ethanol only
 * Source:    OIML R 22 (1975), Table IV
 * @example   densityAtStrength(0.4).densityGPerMl // 0.94805
 */
export function densityAtStrength(ethanolVolumeFraction: number): DensityAtStrength {
  const p = massFractionAt20(ethanolVolumeFraction);
  const densityGPerMl = densityAt20(p);
  const slopeOfDensity = densitySlopeAt20(p);
  const slopeOfStrength = (densityGPerMl + p * slopeOfDensity) / ETHANOL_DENSITY_G_PER_ML;
  return { densityGPerMl, slopeGPerMl: slopeOfDensity / slopeOfStrength };
}

/**
 * Density at 20 C of a mixture of known strength.
 *
 * Formula:   rho(p(q), 20)
 * @param ethanolVolumeFraction   ethanol volume fraction at 20 C [0 to 1]
 * @returns                       density at 20 C [g/mL]
 * Range:     0 <= ethanolVolumeFraction <= 1
 * Accuracy:  0.00001 g/mL against the printed tables
 * Limits:    water and ethanol only
 * Source:    OIML R 22 (1975), Table IV
 * @example   densityFromVolumeFraction(0.4) // 0.94805
 */
export function densityFromVolumeFraction(ethanolVolumeFraction: number): number {
  return ethanolWaterDensityAt20(massFractionFromVolumeFraction(ethanolVolumeFraction));
}

/** A density less that of a mixture: it rises as the mixture gets stronger and lighter. */
function densityExcess(p: number, density: number): ValueAndSlope {
  return { value: density - densityAt20(p), slope: -densitySlopeAt20(p) };
}

const ROUNDING_G_PER_ML = 1e-12;

/** The value, moved to a limit that it misses by rounding alone. */
function withinRounding(input: { quantity: string; value: number; min: number; max: number }): number {
  const { min, max } = input;
  requireWithin({ ...input, min: min - ROUNDING_G_PER_ML, max: max + ROUNDING_G_PER_ML });
  return Math.min(max, Math.max(min, input.value));
}

/**
 * Ethanol mass fraction of a mixture of known density at 20 C.
 *
 * Formula:   the p that solves rho(p, 20) = density
 * @param densityGPerMl   density at 20 C [g/mL]
 * @returns               ethanol mass per mass of mixture [0 to 1]
 * Range:     0.7892391 <= densityGPerMl <= 0.99820123
 * Accuracy:  inverse of the formula to 1e-12
 * Limits:    with sugar in the liquid this is an apparent strength, too low
 * Source:    OIML R 22 (1975), Table VI
 * @example   massFractionFromDensity(0.9) // 0.5612
 */
export function massFractionFromDensity(densityGPerMl: number): number {
  const bounds = { min: ETHANOL_DENSITY_G_PER_ML, max: WATER_DENSITY_G_PER_ML };
  const density = withinRounding({ quantity: 'densityGPerMl', value: densityGPerMl, ...bounds });
  const root = solveIncreasing({
    evaluate: densityExcess,
    given: density,
    low: 0,
    high: 1,
    start: (bounds.max - density) / (bounds.max - bounds.min),
    tolerance: MASS_FRACTION_TOLERANCE,
  });
  if (!root.ok) throw new DomainError({ quantity: 'densityGPerMl', value: densityGPerMl, ...bounds });
  return root.x;
}
