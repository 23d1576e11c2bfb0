/**
 * Mixing: masses are added, and only the sum becomes a volume. So the order of mixing does not matter, and mixing a
 * liquid with itself changes nothing but the amount.
 *
 * Assumes 20 C throughout, and that nothing reacts, foams or evaporates. Sources: docs/decisions/0003-mass-first.md,
 * docs/sources/ternary.md.
 */
import { NO_ACIDS, apparentVolumeOfAcidsMl, totalAcid } from './acids.ts';
import { ACID_KEYS, type AcidKey } from './composition.ts';
import { type Contents, REST_VOLUME_ML_PER_G } from './contents.ts';
import { requireNotNegative } from './domain-error.ts';
import { WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';
import { tabarieVolumeMl } from './ternary.ts';

/** Some millilitres of a liquid. */
export interface Portion {
  /** What one millilitre of it holds. */
  readonly contentsPerMl: Contents;
  /** How much of it [mL at 20 C]. */
  readonly volumeMl: number;
  /** Name shown in warnings. */
  readonly name?: string;
}

/**
 * Masses in several portions together.
 *
 * Formula:   m_i = sum over portions of V * m_i per mL
 * @param portions   liquids with their volumes; none gives an empty glass
 * @returns          masses [g] and residual volume [mL]
 * Range:     volumes that are not negative
 * Accuracy:  exact (mass balance)
 * Limits:    nothing reacts or evaporates
 * Source:    mass balance
 * @example   mixContents([{ contentsPerMl: WATER_CONTENTS_PER_ML, volumeMl: 50 }]).waterG // 49.91
 */
export function mixContents(portions: readonly Portion[]): Contents {
  const mixed = { ethanolG: 0, waterG: 0, sugarG: 0, acidsG: NO_ACIDS, restG: 0, residualMl: 0 };
  let acidsG: Record<AcidKey, number> | null = null;
  for (const { contentsPerMl: part, volumeMl } of portions) {
    requireNotNegative({ quantity: 'volumeMl', value: volumeMl });
    mixed.ethanolG += part.ethanolG * volumeMl;
    mixed.waterG += part.waterG * volumeMl;
    mixed.sugarG += part.sugarG * volumeMl;
    mixed.restG += part.restG * volumeMl;
    mixed.residualMl += part.residualMl * volumeMl;
    if (part.acidsG === NO_ACIDS) continue;
    acidsG ??= { ...NO_ACIDS };
    for (const key of ACID_KEYS) acidsG[key] += part.acidsG[key] * volumeMl;
  }
  if (acidsG !== null) mixed.acidsG = acidsG;
  return mixed;
}

/** One millilitre of water at 20 C. */
export const WATER_CONTENTS_PER_ML: Contents = {
  ethanolG: 0,
  waterG: WATER_DENSITY_G_PER_ML,
  sugarG: 0,
  acidsG: NO_ACIDS,
  restG: 0,
  residualMl: 0,
};

/**
 * Contents with water added, such as ice that melted.
 *
 * Formula:   m_w + added
 * @param input.contents   what there is
 * @param input.waterG     water to add [g]
 * @returns                masses [g] and residual volume [mL]
 * Range:     waterG >= 0
 * Accuracy:  exact (mass balance)
 * Limits:    says nothing about temperature
 * Source:    mass balance
 * @example   addWater({ contents: WATER_CONTENTS_PER_ML, waterG: 1 }).waterG // 1.998
 */
export function addWater(input: { contents: Contents; waterG: number }): Contents {
  const added = requireNotNegative({ quantity: 'waterG', value: input.waterG });
  return { ...input.contents, waterG: input.contents.waterG + added };
}

/**
 * Two contents together.
 *
 * Formula:   sum of the masses
 * @param input.first    one liquid
 * @param input.second   the other
 * @returns              masses [g] and residual volume [mL]
 * Range:     any
 * Accuracy:  exact (mass balance)
 * Limits:    nothing reacts or evaporates
 * Source:    mass balance
 * @example   addContents({ first: WATER_CONTENTS_PER_ML, second: WATER_CONTENTS_PER_ML }).waterG // 1.996
 */
export function addContents(input: { first: Contents; second: Contents }): Contents {
  return mixContents([
    { contentsPerMl: input.first, volumeMl: 1 },
    { contentsPerMl: input.second, volumeMl: 1 },
  ]);
}

/**
 * Mass of everything in a liquid.
 *
 * Formula:   m_e + m_w + m_s + sum m_a + m_rest
 * @param contents   what is in it
 * @returns          mass [g]; of what is in 1 mL it is the density [g/mL]
 * Range:     any
 * Accuracy:  exact
 * Limits:    none
 * Source:    mass balance
 * @example   massGOfContents(WATER_CONTENTS_PER_ML) // 0.9982
 */
export function massGOfContents(contents: Contents): number {
  return contents.ethanolG + contents.waterG + contents.sugarG + totalAcid(contents.acidsG) + contents.restG;
}

/**
 * Volume at 20 C that contents make.
 *
 * Formula:   V = V_T(m_e, m_w, m_s) + sum m_a v_a + 0.62 m_rest + V_residual
 * @param contents   what is in the liquid
 * @returns          volume at 20 C [mL]
 * Range:     masses that are not negative
 * Accuracy:  0.05 % for finished drinks; ±0.4 % for strong sweet liqueurs
 * Limits:    a cold drink is smaller: by 0.4 to 0.6 % at -5 C
 * Source:    OIV-MA-AS2-03B; apparent volumes in docs/sources/acids.md
 * @example   volumeMlOfContents(WATER_CONTENTS_PER_ML) // 1.000
 */
export function volumeMlOfContents(contents: Contents): number {
  return (
    tabarieVolumeMl(contents) +
    apparentVolumeOfAcidsMl(contents.acidsG) +
    REST_VOLUME_ML_PER_G * contents.restG +
    contents.residualMl
  );
}

/**
 * What is missing when volumes are merely added.
 *
 * Formula:   sum of V_i - V of the mix
 * @param portions   liquids with their volumes
 * @returns          contraction at 20 C [mL]; negative where a mix takes up more room than its parts
 * Range:     volumes that are not negative
 * Accuracy:  0.05 mL in 100 mL for drinks
 * Limits:    as volumeMlOfContents
 * Source:    OIML R 22 (1975), OIV-MA-AS2-03B
 * @example   contractionMl([{ contentsPerMl: WATER_CONTENTS_PER_ML, volumeMl: 50 }]) // 0.000
 */
export function contractionMl(portions: readonly Portion[]): number {
  const sumOfPartsMl = portions.reduce((sum, portion) => sum + portion.volumeMl, 0);
  return sumOfPartsMl - volumeMlOfContents(mixContents(portions));
}
