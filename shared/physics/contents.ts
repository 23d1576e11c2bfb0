/**
 * From what a label says to what is in a liquid: grams of ethanol, water, sugar, acids and rest in one millilitre.
 *
 * Ethanol, sugar and acids follow from the composition. Water is what closes the mass. Acids take up their apparent volume, and
 * the Tabarié relation describes the liquid without it. Where the density was measured and the liquid is heavier than its
 * composition explains, `rest` is the dissolved mass that closes both mass and volume at 0.62 mL/g. Where it is
 * lighter (cream), the volume that is left over is carried along. So a liquid always has exactly the density that was
 * given, and mixing it with itself changes nothing. All at 20 C. Sources: ternary, acid-volumes, rest-volume
 * (docs/sources/ternary.md, docs/sources/acids.md).
 */
import { NO_ACIDS, apparentVolumeOfAcidsMl, totalAcid } from './acids.ts';
import { ACID_KEYS, type AcidKey, COMPOSITION_RANGES, type Composition } from './composition.ts';
import { DomainError, requireWithin } from './domain-error.ts';
import { ETHANOL_DENSITY_G_PER_ML } from './ethanol-water.ts';
import { solveIncreasing, type ValueAndSlope } from './solve-increasing.ts';
import { DRY_SUGAR_DENSITY_G_PER_ML } from './sucrose-water.ts';
import { tabarieMassG, tabarieVolumeMl } from './ternary.ts';

/** Masses in a portion of liquid, and the volume its composition does not explain. */
export interface Contents {
  readonly ethanolG: number;
  readonly waterG: number;
  readonly sugarG: number;
  readonly acidsG: Readonly<Record<AcidKey, number>>;
  /** Dissolved or suspended matter that is none of the above [g]. */
  readonly restG: number;
  /** Volume beyond what the masses make: positive in liquids lighter than their composition, such as cream [mL]. */
  readonly residualMl: number;
}

/** Volume that one gram of rest adds [mL/g]: that of dissolved sugar; ±0.1, from memory. */
export const REST_VOLUME_ML_PER_G = 0.62;

/** Residual volume per volume above which a given density and its composition hardly belong together [mL/mL]. */
export const RESIDUAL_WARNING = 0.03;

const ML_PER_L = 1000;
/** Last Newton step of the rest in 1 mL [g]; what is left is of the order of its square. */
const REST_STEP_TOLERANCE_G = 1e-8;

/** The parts of one millilitre that follow from the composition alone. */
interface Stated {
  readonly ethanolG: number;
  readonly ethanolMl: number;
  readonly sugarG: number;
  readonly acidsG: Readonly<Record<AcidKey, number>>;
  readonly acidG: number;
  readonly acidMl: number;
}

function acidsPerMl(composition: Composition): Readonly<Record<AcidKey, number>> {
  const { min, max } = COMPOSITION_RANGES.acidGPerL;
  let acidsG: Record<AcidKey, number> | null = null;
  for (const key of ACID_KEYS) {
    const value = composition.acidsGPerL[key];
    if (value === undefined || value === 0) continue;
    acidsG ??= { ...NO_ACIDS };
    acidsG[key] = requireWithin({ quantity: key, value, min, max }) / ML_PER_L;
  }
  return acidsG ?? NO_ACIDS;
}

function statedPerMl(composition: Composition): Stated {
  const { abvFraction: abv, sugarGPerL: sugar } = COMPOSITION_RANGES;
  const ethanolMl = requireWithin({
    quantity: 'abvFraction',
    value: composition.abvFraction,
    min: abv.min,
    max: abv.max,
  });
  const sugarGPerL = requireWithin({
    quantity: 'sugarGPerL',
    value: composition.sugarGPerL,
    min: sugar.min,
    max: sugar.max,
  });
  const acidsG = acidsPerMl(composition);
  return {
    ethanolG: ethanolMl * ETHANOL_DENSITY_G_PER_ML,
    ethanolMl,
    sugarG: sugarGPerL / ML_PER_L,
    acidsG,
    acidG: totalAcid(acidsG),
    acidMl: apparentVolumeOfAcidsMl(acidsG),
  };
}

/** Least volume that could hold the ethanol and the sugar [mL/mL]. */
function leastRoomMl(stated: Stated): number {
  return Math.max(stated.ethanolMl, stated.sugarG / DRY_SUGAR_DENSITY_G_PER_ML);
}

/** Mass of the ethanol, sugar and water that fill what acids leave of a millilitre, with its slope. */
function ternaryMass(volumeMl: number, stated: Stated): ValueAndSlope {
  if (volumeMl <= 0) return { value: 0, slope: 1 };
  return tabarieMassG({ volumeMl, ethanolMl: stated.ethanolMl, sugarG: stated.sugarG });
}

/** Density that the composition alone explains [g/mL]; nonsense where its parts do not fit into a millilitre. */
function explainedDensity(stated: Stated): number {
  const roomMl = requireWithin({
    quantity: 'room left by acids for ethanol and sugar [mL/mL]',
    value: 1 - stated.acidMl,
    min: leastRoomMl(stated),
    max: 1,
  });
  return ternaryMass(roomMl, stated).value + stated.acidG;
}

/** Rounding may leave a trace below nothing; more than that is nonsense. */
const WATER_ROUNDING_G = 1e-9;

/** Water is what is left of a mass. */
function remainingWaterG(input: { massG: number; stated: Stated; restG: number }): number {
  const { massG, stated, restG } = input;
  const water = massG - stated.ethanolG - stated.sugarG - stated.acidG - restG;
  if (water < -WATER_ROUNDING_G) {
    throw new DomainError({ quantity: 'waterG in 1 mL', value: water, min: 0, max: massG });
  }
  return Math.max(0, water);
}

/** Density with some rest less the density that was given. */
function excessDensity(restG: number, given: { stated: Stated; densityGPerMl: number }): ValueAndSlope {
  const { stated, densityGPerMl } = given;
  const liquid = ternaryMass(1 - stated.acidMl - REST_VOLUME_ML_PER_G * restG, stated);
  return {
    value: liquid.value + stated.acidG + restG - densityGPerMl,
    slope: 1 - REST_VOLUME_ML_PER_G * liquid.slope,
  };
}

/** The rest that makes a liquid as heavy as it was found to be. More rest is always more mass: it displaces 0.62 mL of liquid. */
function restThatClosesG(densityGPerMl: number, stated: Stated): number {
  const given = { stated, densityGPerMl };
  const high = (1 - stated.acidMl - leastRoomMl(stated)) / REST_VOLUME_ML_PER_G;
  const nothing = excessDensity(0, given);
  const start = -nothing.value / nothing.slope;
  const root = solveIncreasing({
    evaluate: excessDensity,
    given,
    low: 0,
    high,
    start,
    tolerance: REST_STEP_TOLERANCE_G,
  });
  if (root.ok) return root.x;
  const max = densityGPerMl + excessDensity(high, given).value;
  throw new DomainError({ quantity: 'densityGPerMl', value: densityGPerMl, min: 0, max });
}

function contentsOf(input: { massG: number; stated: Stated; restG: number; isLighter: boolean }): Contents {
  const { stated, restG } = input;
  const { ethanolG, sugarG, acidsG } = stated;
  const waterG = remainingWaterG(input);
  const residualMl = input.isLighter ? 1 - stated.acidMl - tabarieVolumeMl({ ethanolG, waterG, sugarG }) : 0;
  return { ethanolG, waterG, sugarG, acidsG, restG, residualMl };
}

/**
 * Masses in one millilitre of a liquid of known composition.
 *
 * Formula:   m_e = q rho_e, m_s = c, m_a = a; water closes the mass; rest (0.62 mL/g) closes mass and volume where a
 *            greater density was given; a residual volume does where a smaller one was
 * @param composition   what a label or a laboratory states: strength, sugar, acids, density or null
 * @returns             masses [g] and residual volume [mL] in 1 mL of the liquid at 20 C
 * Range:     COMPOSITION_RANGES, as far as the parts fit into a litre together (see fitOfComposition)
 * Accuracy:  mass and volume close to 1e-12; water 0.1 % for drinks and juices
 * Limits:    rest is a sum of all that is not stated, such as salts, protein, fat and errors of the statement
 * Source:    OIV-MA-AS2-03B for density; docs/decisions/0003-mass-first.md
 * @example   contentsPerMl({ abvFraction: 0.4, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null }).waterG // 0.6323
 */
export function contentsPerMl(composition: Composition): Contents {
  const stated = statedPerMl(composition);
  const explained = explainedDensity(stated);
  if (composition.densityGPerMl === null) {
    return contentsOf({ massG: explained, stated, restG: 0, isLighter: false });
  }
  const { min, max } = COMPOSITION_RANGES.densityGPerMl;
  const massG = requireWithin({ quantity: 'densityGPerMl', value: composition.densityGPerMl, min, max });
  const isLighter = massG < explained;
  return contentsOf({ massG, stated, restG: isLighter ? 0 : restThatClosesG(massG, stated), isLighter });
}

/**
 * Density that the stated ethanol, sugar and acids explain, whatever density was measured.
 *
 * Formula:   rho = (1 - sum a_i v_i) * rho_T(q', c') + sum a_i, with q' and c' referred to the liquid without its acids
 * @param composition   what a label or a laboratory states; its density is not looked at
 * @returns             density at 20 C [g/mL]
 * Range:     COMPOSITION_RANGES, as far as the parts fit into a litre together
 * Accuracy:  0.1 % for liquids of ethanol, sugar, acid and water; wine and juice are heavier by what is not stated
 * Limits:    as tabarieDensityGPerMl
 * Source:    OIV-MA-AS2-03B; apparent volumes in docs/sources/acids.md
 * @example   computedDensityGPerMl({ abvFraction: 0, sugarGPerL: 614.8, acidsGPerL: {}, densityGPerMl: null }) // 1.2296
 */
export function computedDensityGPerMl(composition: Composition): number {
  return explainedDensity(statedPerMl(composition));
}

/**
 * Density the calculations use: the one that was given, or else the computed one.
 *
 * Formula:   the given density, or computedDensityGPerMl
 * @param composition   what a label or a laboratory states
 * @returns             density at 20 C [g/mL]
 * Range:     COMPOSITION_RANGES
 * Accuracy:  that of the density given, or of computedDensityGPerMl
 * Limits:    none of its own
 * Source:    docs/decisions/0003-mass-first.md
 * @example   densityInUseGPerMl({ abvFraction: 0, sugarGPerL: 17, acidsGPerL: {}, densityGPerMl: 1.03 }) // 1.03
 */
export function densityInUseGPerMl(composition: Composition): number {
  return composition.densityGPerMl ?? computedDensityGPerMl(composition);
}

/** Whether a composition can be poured, and if not, which quantity does not fit. */
export type CompositionFit =
  | { readonly ok: true }
  | {
      readonly ok: false;
      readonly reason: 'does-not-fit';
      readonly quantity: string;
      readonly value: number;
      readonly min: number;
      readonly max: number;
    };

/**
 * Tells whether the parts of a composition fit into a litre together, without throwing.
 *
 * Formula:   contentsPerMl, its DomainError turned into a result
 * @param composition   what a person entered
 * @returns             ok, or the quantity that does not fit with its limits
 * Range:     any numbers
 * Accuracy:  that of contentsPerMl
 * Limits:    a composition that fits may still be wrong
 * Source:    docs/decisions/0004-three-answers-to-bad-input.md
 * @example   fitOfComposition({ abvFraction: 0.9, sugarGPerL: 900, acidsGPerL: {}, densityGPerMl: null }).ok // false
 */
export function fitOfComposition(composition: Composition): CompositionFit {
  try {
    contentsPerMl(composition);
    return { ok: true };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { quantity, value, min, max } = error;
    return { ok: false, reason: 'does-not-fit', quantity, value, min, max };
  }
}
