/**
 * Ethanol and water: density at any strength and temperature, and the way between mass and volume fraction.
 *
 * p ethanol mass fraction [0 to 1], q ethanol volume fraction at 20 C [0 to 1], t temperature [C], rho density.
 * Strength is always referred to 20 C. Sources: oiml-r22 (docs/sources/alcoholometry.md).
 */
import { R22_A, R22_B, R22_C } from './data/oiml-r22.ts';
import { requireWithin } from './domain-error.ts';

/** Temperatures for which the formula was fitted, above the freezing line [C]. */
export const R22_TEMPERATURE_RANGE_C = { min: -20, max: 40 } as const;

/** Density of pure ethanol at 20 C by the same formula [g/mL]. */
export const ETHANOL_DENSITY_G_PER_ML = 0.789239;

/** Density of water at 20 C in OIML R 22 [g/mL]; 6 ppm below the CIPM value, kept so that joins are exact. */
export const WATER_DENSITY_G_PER_ML = 0.99820123;

const KG_PER_M3_IN_G_PER_ML = 1000;
const REFERENCE_C = 20;
const SOLVER_TOLERANCE = 1e-13;
const SOLVER_MAX_STEPS = 60;

/** a_0 + a_1 x + a_2 x^2 + … */
function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let index = coefficients.length - 1; index >= 0; index -= 1)
    sum = sum * x + (coefficients[index] ?? 0);
  return sum;
}

/** The same with no constant term: a_1 x + a_2 x^2 + … */
function polynomialFromX(coefficients: readonly number[], x: number): number {
  return x * polynomial(coefficients, x);
}

/** Density at 20 C without checks, for the inner loops [g/mL]. */
function densityAt20(p: number): number {
  return polynomial(R22_A, p) / KG_PER_M3_IN_G_PER_ML;
}

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
 * @example   densityOfEthanolWater({ ethanolMassFraction: 0.5, temperatureC: 20 }) // 0.91377
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
  let rho = polynomial(R22_A, p) + polynomialFromX(R22_B, offset);
  R22_C.forEach((row, index) => {
    rho += polynomialFromX(row, p) * offset ** (index + 1);
  });
  return rho / KG_PER_M3_IN_G_PER_ML;
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
 * Accuracy:  inverse of the formula to 1e-12
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

/** The inverse without a check. q(0) = 0 and q(1) = 1 bracket the root, and q rises with p throughout. */
export function massFractionAt20(q: number): number {
  let low = 0;
  let high = 1;
  let p = q * (0.79 + 0.21 * q);
  for (let step = 0; step < SOLVER_MAX_STEPS; step += 1) {
    const excess = (p * densityAt20(p)) / ETHANOL_DENSITY_G_PER_ML - q;
    if (excess > 0) high = p;
    else low = p;
    const slope = (densityAt20(p) + p * densitySlopeAt20(p)) / ETHANOL_DENSITY_G_PER_ML;
    let next = p - excess / slope;
    if (!(next >= low && next <= high)) next = (low + high) / 2;
    if (Math.abs(next - p) <= SOLVER_TOLERANCE) return next;
    p = next;
  }
  return p;
}

function densitySlopeAt20(p: number): number {
  let sum = 0;
  for (let index = R22_A.length - 1; index >= 1; index -= 1) sum = sum * p + index * (R22_A[index] ?? 0);
  return sum / KG_PER_M3_IN_G_PER_ML;
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
  return densityAt20(massFractionFromVolumeFraction(ethanolVolumeFraction));
}
