/**
 * The figures of a finished drink: lines mixed, diluted, topped, and only then turned into a volume.
 *
 * All volumes at 20 C; strength is ethanol by volume at 20 C per volume of the finished drink at 20 C. Energy, freezing point and acid
 * follow from what is in it. The wash line (`glass.ts`) and allergens are not physics of the liquid and are added elsewhere.
 * Sources: docs/calculations.md.
 */
import { acidAsCitric, totalAcid } from './acids.ts';
import { ACID_KEYS, type AcidKey } from './composition.ts';
import { type Contents, RESIDUAL_WARNING } from './contents.ts';
import { type Dilution, type DilutionInput, type Method, type UndilutedMix, dilutionOf } from './dilution.ts';
import { requireWithin } from './domain-error.ts';
import { energyOf } from './energy.ts';
import { ETHANOL_DENSITY_G_PER_ML, WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';
import { freezingPointC } from './freezing.ts';
import {
  type Portion,
  addContents,
  addWater,
  massGOfContents,
  mixContents,
  volumeMlOfContents,
} from './mixing.ts';
import { MODEL_DIFFERENCE_WARNING, TABARIE_PUBLISHED_RANGE, modelDifference } from './ternary.ts';
import type { CalculationWarning } from './warning.ts';

/** Volumes that can be evaluated: more than nothing, up to the largest batch [mL]. */
export const DRINK_VOLUME_RANGE_ML = { min: Number.MIN_VALUE, max: 1_000_000 } as const;

const ML_PER_L = 1000;

/** Less acid than this is none: no method of the bar finds it, and a ratio to it says nothing [g/L as citric]. */
export const LEAST_ACID_G_PER_L = 0.001;

/** Every figure of the liquid; members mean what the contract's `Figures` says of them. */
export interface FinishedDrink {
  readonly sumOfPartsMl: number;
  readonly undilutedMl: number;
  readonly undilutedMassG: number;
  readonly undilutedAbvFraction: number;
  readonly contractionMl: number;
  readonly dilutionFraction: number;
  readonly dilutionKind: DilutionInput['kind'];
  readonly meltWaterMl: number;
  readonly meltWaterG: number;
  readonly topMl: number;
  readonly finalMl: number;
  readonly finalMassG: number;
  readonly densityGPerMl: number;
  readonly abvFraction: number;
  readonly ethanolG: number;
  readonly waterG: number;
  readonly sugarG: number;
  readonly sugarGPerL: number;
  readonly acidsGPerL: Record<AcidKey, number>;
  readonly acidCitricG: number;
  readonly acidCitricGPerL: number;
  readonly sugarAcidRatio: number | null;
  readonly energyKcal: number;
  readonly energyKj: number;
  readonly freezingPointC: number | null;
  readonly warnings: CalculationWarning[];
}

function sumOfVolumesMl(portions: readonly Portion[]): number {
  return portions.reduce((sum, portion) => sum + portion.volumeMl, 0);
}

/** Rounding may leave a trace above pure ethanol; more than that is nonsense, and stops the calculation later. */
const ABV_ROUNDING = 1e-9;

function abvFractionOf(input: { ethanolG: number; volumeMl: number }): number {
  if (input.volumeMl === 0) return 0;
  const abvFraction = input.ethanolG / ETHANOL_DENSITY_G_PER_ML / input.volumeMl;
  return abvFraction > 1 && abvFraction <= 1 + ABV_ROUNDING ? 1 : abvFraction;
}

function lighterThanComposition(portion: Portion): CalculationWarning {
  return {
    code: 'lighter-than-composition',
    quantity: 'residualMl per mL',
    value: portion.contentsPerMl.residualMl,
    min: null,
    max: RESIDUAL_WARNING,
    detail: `${portion.name ?? 'An ingredient'} is lighter than its strength and sugar explain: check its density.`,
  };
}

function outsideTernary(contents: Contents): CalculationWarning[] {
  const massG = contents.ethanolG + contents.waterG + contents.sugarG;
  const { ethanolMassFraction, sugarMassFraction } = TABARIE_PUBLISHED_RANGE;
  const isPublished =
    contents.ethanolG <= ethanolMassFraction.max * massG || contents.sugarG <= sugarMassFraction.max * massG;
  if (isPublished) return [];
  const value = modelDifference(contents);
  if (Math.abs(value) <= MODEL_DIFFERENCE_WARNING) return [];
  return [
    {
      code: 'extrapolated',
      quantity: 'volume by two models, relative difference',
      value,
      min: -MODEL_DIFFERENCE_WARNING,
      max: MODEL_DIFFERENCE_WARNING,
      detail: 'Strong and sweet at once: outside what the density relation was checked for.',
    },
  ];
}

function noPublishedCurve(method: Method): CalculationWarning {
  return {
    code: 'no-published-curve',
    quantity: 'dilutionFraction',
    value: null,
    min: null,
    max: null,
    detail: `There is no published dilution for ${method}: weigh it or set it by hand. None is counted.`,
  };
}

/** A mix that holds nothing takes up no water: a drink of top lines only is not diluted. */
function diluted(input: { choice: DilutionInput; method: Method; mix: UndilutedMix }): Dilution {
  return input.mix.volumeMl === 0 ? { ok: true, fraction: 0, warnings: [] } : dilutionOf(input);
}

/** Mix, dilution and melt water. */
function mixAndDilute(input: { mixPortions: readonly Portion[]; dilution: DilutionInput; method: Method }) {
  const contents = mixContents(input.mixPortions);
  const volumeMl = volumeMlOfContents(contents);
  const mix = {
    volumeMl,
    massG: massGOfContents(contents),
    abvFraction: abvFractionOf({ ethanolG: contents.ethanolG, volumeMl }),
  };
  const dilution = diluted({ choice: input.dilution, method: input.method, mix });
  const fraction = dilution.ok ? dilution.fraction : 0;
  const meltWaterMl = fraction * volumeMl;
  return {
    mix,
    fraction,
    kind: dilution.ok && volumeMl > 0 ? input.dilution.kind : ('none' as const),
    warnings: dilution.ok ? dilution.warnings : [noPublishedCurve(dilution.method)],
    meltWaterMl,
    meltWaterG: meltWaterMl * WATER_DENSITY_G_PER_ML,
    afterIce: addWater({ contents, waterG: meltWaterMl * WATER_DENSITY_G_PER_ML }),
  };
}

function acidsPerLitre(contents: Contents, volumeMl: number): Record<AcidKey, number> {
  const acidsGPerL = { ...contents.acidsG };
  for (const key of ACID_KEYS) acidsGPerL[key] = (contents.acidsG[key] / volumeMl) * ML_PER_L;
  return acidsGPerL;
}

/** What follows from the contents of the finished drink and its volume. */
function figuresOfLiquid(contents: Contents, volumeMl: number) {
  const { ethanolG, waterG, sugarG } = contents;
  const finalMassG = massGOfContents(contents);
  const acidCitricG = acidAsCitric(contents.acidsG);
  const acidCitricGPerL = (acidCitricG / volumeMl) * ML_PER_L;
  const energy = energyOf({ ethanolG, sugarG, acidG: totalAcid(contents.acidsG) });
  return {
    finalMl: volumeMl,
    finalMassG,
    densityGPerMl: finalMassG / volumeMl,
    abvFraction: abvFractionOf({ ethanolG, volumeMl }),
    ethanolG,
    waterG,
    sugarG,
    sugarGPerL: (sugarG / volumeMl) * ML_PER_L,
    acidsGPerL: acidsPerLitre(contents, volumeMl),
    acidCitricG,
    acidCitricGPerL,
    sugarAcidRatio: acidCitricGPerL >= LEAST_ACID_G_PER_L ? sugarG / acidCitricG : null,
    energyKcal: energy.kcal,
    energyKj: energy.kJ,
    freezingPointC: freezingPointC(contents),
  };
}

/**
 * All figures of a finished drink.
 *
 * Formula:   masses added, melt water D V_mix rho_w added, top lines added; V of the sum; ABV = m_e / 0.789239 / V
 * @param input.mixPortions   lines that go in with the ice [mL of each, with what one mL holds]
 * @param input.topPortions   lines added afterwards, such as soda [mL of each, with what one mL holds]
 * @param input.dilution      where the dilution comes from
 * @param input.method        how the drink is mixed, for its published curve
 * @returns                   every figure of the liquid with the warnings of the calculation
 * Range:     more than 0 mL in all; up to 1000 L
 * Accuracy:  volume 0.05 % for the physics; 5 to 10 % with a published dilution, and what the pour adds
 * Limits:    20 C: at -5 C a drink of 15 to 20 % vol is 0.4 to 0.6 % smaller; foam and bubbles are not counted
 * Source:    docs/calculations.md
 * @example   finishedDrink({ mixPortions: [{ contentsPerMl: WATER_CONTENTS_PER_ML, volumeMl: 80 }], topPortions: [], dilution: { kind: 'by hand', dilutionFraction: 0.25 }, method: 'stir' }).finalMl // 100.0
 */
export function finishedDrink(input: {
  mixPortions: readonly Portion[];
  topPortions: readonly Portion[];
  dilution: DilutionInput;
  method: Method;
}): FinishedDrink {
  const sumOfPartsMl = sumOfVolumesMl(input.mixPortions);
  const topMl = sumOfVolumesMl(input.topPortions);
  requireWithin({ quantity: 'volumeMl of all lines', value: sumOfPartsMl + topMl, ...DRINK_VOLUME_RANGE_ML });
  const made = mixAndDilute(input);
  const contents =
    topMl === 0
      ? made.afterIce
      : addContents({ first: made.afterIce, second: mixContents(input.topPortions) });
  const finalMl = volumeMlOfContents(contents);
  const light = [...input.mixPortions, ...input.topPortions].filter(
    (portion) => portion.contentsPerMl.residualMl > RESIDUAL_WARNING,
  );
  return {
    sumOfPartsMl,
    undilutedMl: made.mix.volumeMl,
    undilutedMassG: made.mix.massG,
    undilutedAbvFraction: made.mix.abvFraction,
    contractionMl: sumOfPartsMl + made.meltWaterMl + topMl - finalMl,
    dilutionFraction: made.fraction,
    dilutionKind: made.kind,
    meltWaterMl: made.meltWaterMl,
    meltWaterG: made.meltWaterG,
    topMl,
    ...figuresOfLiquid(contents, finalMl),
    warnings: [...made.warnings, ...light.map(lighterThanComposition), ...outsideTernary(contents)],
  };
}
