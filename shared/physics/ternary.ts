/**
 * Ethanol, sugar and water together: the volume that given masses make at 20 C, by two independent models.
 *
 * Tabarié: rho(q, c) = rho_ew(q) + rho_sw(c) - rho_w, with q the ethanol volume fraction and c the sugar concentration of the
 * final liquid. It is the relation the figures use. Water basis: each solute is given all the water. It is computed
 * beside it to tell how far the figures can be trusted. Both are exact without ethanol and without sugar.
 * E = m_e / rho_e ethanol volume [mL], m masses [g], V volume [mL]. Sources: oiv-as2-03b, hackbarth-2009, hackbarth-2011
 * (docs/sources/ternary.md).
 */
import { DomainError, requireNotNegative, requireWithin } from './domain-error.ts';
import {
  ETHANOL_DENSITY_G_PER_ML,
  WATER_DENSITY_G_PER_ML,
  densityAtStrength,
  ethanolWaterDensityAt20,
} from './ethanol-water.ts';
import { solveIncreasing, type ValueAndSlope } from './solve-increasing.ts';
import { DRY_SUGAR_DENSITY_G_PER_ML, densityAtConcentration, sucroseDensityAt20 } from './sucrose-water.ts';

/** Where Tabarié was found within the limits of measurement: mass fractions (Hackbarth 2009 and 2011, abstracts). */
export const TABARIE_PUBLISHED_RANGE = {
  ethanolMassFraction: { min: 0, max: 0.18 },
  sugarMassFraction: { min: 0, max: 0.05 },
} as const;

/** Outside the published range, a difference of the two models beyond this is worth a warning [1]: 0.1 % of volume. */
export const MODEL_DIFFERENCE_WARNING = 0.001;

/** Last Newton step of a volume, relative to it [1]; what is left is of the order of its square. */
export const VOLUME_STEP_TOLERANCE = 1e-8;

/** Masses of the three that make up most of any drink [g]. */
export interface TernaryMasses {
  readonly ethanolG: number;
  readonly waterG: number;
  readonly sugarG: number;
}

/**
 * Density at 20 C of a liquid of ethanol, sugar and water, by the Tabarié relation.
 *
 * Formula:   rho = rho_ew(q) + rho_sw(c) - rho_w
 * @param input.abvFraction   ethanol volume fraction of the liquid at 20 C [0 to 1]
 * @param input.sugarGPerMl   sugar mass per volume of the liquid [g/mL]
 * @returns                   density at 20 C [g/mL]
 * Range:     0 <= abvFraction <= 1, 0 <= sugarGPerMl <= 1.55
 * Accuracy:  0.05 % for finished drinks (10 to 30 % vol, under 150 g/L); ±0.4 % at 40 % vol and 240 g/L
 * Limits:    published as good to 18 % mass ethanol and 5 % mass sugar; stronger sweet liquids are a little more
 *            voluminous than it says
 * Source:    OIV-MA-AS2-03B; Hackbarth 2009 and 2011 for its validity
 * @example   tabarieDensityGPerMl({ abvFraction: 0.2, sugarGPerMl: 0.25 }) // 1.0691
 */
export function tabarieDensityGPerMl(input: { abvFraction: number; sugarGPerMl: number }): number {
  const q = requireWithin({ quantity: 'abvFraction', value: input.abvFraction, min: 0, max: 1 });
  const c = requireWithin({
    quantity: 'sugarGPerMl',
    value: input.sugarGPerMl,
    min: 0,
    max: DRY_SUGAR_DENSITY_G_PER_ML,
  });
  const ethanolWater = densityAtStrength(q).densityGPerMl;
  return ethanolWater + densityAtConcentration(c).densityGPerMl - WATER_DENSITY_G_PER_ML;
}

/**
 * Mass of the ethanol, sugar and water that fill a volume at 20 C, with its slope, unchecked: for inner loops.
 *
 * Formula:   M = V * rho(E / V, m_s / V); dM/dV = rho - q * drho/dq - c * drho/dc
 * @param input.volumeMl    volume of the liquid [mL]
 * @param input.ethanolMl   ethanol in it, as the volume it would have alone [mL]
 * @param input.sugarG      sugar in it [g]
 * @returns                 mass [g] and its slope, the mass that one more mL of it would add as water [g/mL]
 * Range:     volumeMl >= ethanolMl and volumeMl >= sugarG / 1.5524, above 0
 * Accuracy:  as tabarieDensityGPerMl
 * Limits:    as tabarieDensityGPerMl
 * Source:    OIV-MA-AS2-03B
 * @example   tabarieMassG({ volumeMl: 100, ethanolMl: 20, sugarG: 25 }).value // 106.91
 */
export function tabarieMassG(input: { volumeMl: number; ethanolMl: number; sugarG: number }): ValueAndSlope {
  const q = input.ethanolMl / input.volumeMl;
  const c = input.sugarG / input.volumeMl;
  const ethanolWater = densityAtStrength(Math.min(1, q));
  const sugarWater = densityAtConcentration(Math.min(DRY_SUGAR_DENSITY_G_PER_ML, c));
  const density = ethanolWater.densityGPerMl + sugarWater.densityGPerMl - WATER_DENSITY_G_PER_ML;
  return {
    value: input.volumeMl * density,
    slope: density - q * ethanolWater.slopeGPerMl - c * sugarWater.slope,
  };
}

/** Mass that fills a volume less the mass there is. */
function excessMass(
  volumeMl: number,
  given: { ethanolMl: number; sugarG: number; massG: number },
): ValueAndSlope {
  const filled = tabarieMassG({ volumeMl, ethanolMl: given.ethanolMl, sugarG: given.sugarG });
  return { value: filled.value - given.massG, slope: filled.slope };
}

/**
 * Volume at 20 C that masses of ethanol, water and sugar make, by the Tabarié relation.
 *
 * Formula:   the V that solves V * rho(E / V, m_s / V) = m_e + m_w + m_s
 * @param masses   masses of ethanol, water and sugar [g]
 * @returns        volume at 20 C [mL]
 * Range:     masses that are not negative
 * Accuracy:  root to 1e-12; the relation: 0.05 % for finished drinks
 * Limits:    as tabarieDensityGPerMl
 * Source:    OIV-MA-AS2-03B. The bracket: at V = max(E, m_s / rho_s) the water asked for is not positive; at
 *            V = m_w / rho_w + E + m_s / rho_s it is at least what there is, since both mixtures contract
 * @example   tabarieVolumeMl({ ethanolG: 39.462, waterG: 53.552, sugarG: 0 }) // 100.00
 */
export function tabarieVolumeMl(masses: TernaryMasses): number {
  const ethanolG = requireNotNegative({ quantity: 'ethanolG', value: masses.ethanolG });
  const waterG = requireNotNegative({ quantity: 'waterG', value: masses.waterG });
  const sugarG = requireNotNegative({ quantity: 'sugarG', value: masses.sugarG });
  if (sugarG === 0) return ethanolWaterVolumeMl({ ethanolG, waterG });
  if (ethanolG === 0) return sugarWaterVolumeMl({ sugarG, waterG });
  const ethanolMl = ethanolG / ETHANOL_DENSITY_G_PER_ML;
  const dryMl = sugarG / DRY_SUGAR_DENSITY_G_PER_ML;
  const waterMl = waterG / WATER_DENSITY_G_PER_ML;
  const massG = ethanolG + waterG + sugarG;
  const high = waterMl + ethanolMl + dryMl;
  const root = solveIncreasing({
    evaluate: excessMass,
    given: { ethanolMl, sugarG, massG },
    low: Math.max(ethanolMl, dryMl),
    high,
    start: waterBasisVolumeMl(masses),
    tolerance: VOLUME_STEP_TOLERANCE * high,
    isBracketProved: true,
  });
  if (!root.ok) throw new DomainError({ quantity: 'waterG', value: waterG, min: 0, max: Number.MAX_VALUE });
  return root.x;
}

/**
 * Volume at 20 C of ethanol and water.
 *
 * Formula:   V = (m_e + m_w) / rho_ew(m_e / (m_e + m_w))
 * @param masses.ethanolG   ethanol [g]
 * @param masses.waterG     water [g]
 * @returns                 volume at 20 C [mL]; 0 for no mass
 * Range:     masses that are not negative
 * Accuracy:  0.001 %
 * Limits:    ethanol and water only
 * Source:    OIML R 22 (1975)
 * @example   ethanolWaterVolumeMl({ ethanolG: 39.462, waterG: 49.91 }) // 96.46
 */
export function ethanolWaterVolumeMl(masses: { ethanolG: number; waterG: number }): number {
  const massG = masses.ethanolG + masses.waterG;
  return massG === 0 ? 0 : massG / ethanolWaterDensityAt20(masses.ethanolG / massG);
}

/**
 * Volume at 20 C of sugar and water.
 *
 * Formula:   V = (m_s + m_w) / rho_sw(m_s / (m_s + m_w))
 * @param masses.sugarG   sugar [g]
 * @param masses.waterG   water [g]
 * @returns               volume at 20 C [mL]; 0 for no mass
 * Range:     sugar up to 85 % of the mass
 * Accuracy:  0.02 % to 60 °Brix
 * Limits:    sucrose and water only
 * Source:    ICUMSA SPS-4 polynomial
 * @example   sugarWaterVolumeMl({ sugarG: 1000, waterG: 1000 }) // 1626.5
 */
export function sugarWaterVolumeMl(masses: { sugarG: number; waterG: number }): number {
  const massG = masses.sugarG + masses.waterG;
  return massG === 0 ? 0 : massG / sucroseDensityAt20(masses.sugarG / massG);
}

/**
 * Volume at 20 C that masses of ethanol, water and sugar make, by the water-basis model.
 *
 * Formula:   V = V_ew(m_e, m_w) + V_sw(m_s, m_w) - V_w(m_w)
 * @param masses   masses of ethanol, water and sugar [g]
 * @returns        volume at 20 C [mL]
 * Range:     masses that are not negative
 * Accuracy:  as tabarieVolumeMl for drinks; better for strong sweet liqueurs, in the direction Hackbarth reports
 * Limits:    from memory (additivity of apparent volumes): no published check was found
 * Source:    docs/sources/ternary.md
 * @example   waterBasisVolumeMl({ ethanolG: 15.78478, waterG: 66.15, sugarG: 25 }) // 100.0
 */
export function waterBasisVolumeMl(masses: TernaryMasses): number {
  return ethanolWaterVolumeMl(masses) + sugarWaterVolumeMl(masses) - masses.waterG / WATER_DENSITY_G_PER_ML;
}

/**
 * How much more volume the water-basis model gives than Tabarié, relative to the volume.
 *
 * Formula:   (V_wb - V_T) / V_T
 * @param masses   masses of ethanol, water and sugar [g]
 * @returns        relative difference [1]; 0 for no mass
 * Range:     masses that are not negative
 * Accuracy:  of the size of either model's own error
 * Limits:    two models that agree may both be wrong
 * Source:    docs/sources/ternary.md
 * @example   modelDifference({ ethanolG: 31.56956, waterG: 48.08, sugarG: 24 }) // 0.003
 */
export function modelDifference(masses: TernaryMasses): number {
  const volumeMl = tabarieVolumeMl(masses);
  return volumeMl === 0 ? 0 : waterBasisVolumeMl(masses) / volumeMl - 1;
}
