/**
 * Units of volume with exact factors, by mathjs.
 *
 * mathjs carries its own US fluid ounce as a rounded number, so the exact one (231 cubic inches ÷ 128, the inch being 25.4 mm) is
 * defined here. Amounts of a spec are read with the constants of `measure-amount.ts`; a test holds them to these factors. mathjs is loaded in this module alone, and made ready only when a unit is first used, so that a page which
 * needs no conversion does not pay for it. Sources: nist-handbook-44, ucum (docs/sources/measures.md).
 */
import { create, createUnitDependencies, unitDependencies } from 'mathjs';

/** One US fluid ounce in cubic inches: a gallon of 231, divided by 128. */
const CUBIC_INCHES_PER_FLUID_OUNCE = 231 / 128;

/** Units of volume that are defined by a standard. */
export const VOLUME_UNITS = ['ml', 'cl', 'oz'] as const;
export type VolumeUnit = (typeof VOLUME_UNITS)[number];

/** Names of the same in mathjs. */
const MATHJS_NAMES: Readonly<Record<VolumeUnit, string>> = {
  ml: 'milliliter',
  cl: 'centiliter',
  oz: 'exactUsFluidOunce',
};

type Factors = Readonly<Record<VolumeUnit, number>>;

function exactFactors(): Factors {
  const math = create({ ...unitDependencies, ...createUnitDependencies });
  math.createUnit(MATHJS_NAMES.oz, math.unit(CUBIC_INCHES_PER_FLUID_OUNCE, 'cuin'));
  const factor = (unit: VolumeUnit): number =>
    Number(math.unit(1, MATHJS_NAMES[unit]).toNumber('milliliter').toPrecision(15));
  return { ml: factor('ml'), cl: factor('cl'), oz: factor('oz') };
}

let factors: Factors | null = null;

/** Millilitres in one of each unit, made on first use. */
function factorsMl(): Factors {
  factors ??= exactFactors();
  return factors;
}

/**
 * Volume in millilitres.
 *
 * Formula:   V = value * factor, with 1 cl = 10 mL and 1 oz = 29.5735295625 mL
 * @param input.value   number of units
 * @param input.unit    ml, cl, or the US fluid ounce
 * @returns             volume [mL]
 * Range:     any number
 * Accuracy:  exact factors, to 15 digits
 * Limits:    the imperial fluid ounce (28.4131 mL) and the 30 mL of labelling are other units
 * Source:    NIST Handbook 44, Appendix C; UCUM [foz_us]
 * @example   volumeMlFromUnit({ value: 1.5, unit: 'oz' }) // 44.36
 */
export function volumeMlFromUnit(input: { value: number; unit: VolumeUnit }): number {
  return input.value * factorsMl()[input.unit];
}

/**
 * A volume in another unit.
 *
 * Formula:   value = V / factor
 * @param input.volumeMl   volume [mL]
 * @param input.unit       ml, cl, or the US fluid ounce
 * @returns                number of units
 * Range:     any number
 * Accuracy:  exact factors, to 15 digits
 * Limits:    as volumeMlFromUnit
 * Source:    NIST Handbook 44, Appendix C; UCUM [foz_us]
 * @example   unitFromVolumeMl({ volumeMl: 60, unit: 'oz' }) // 2.0288
 */
export function unitFromVolumeMl(input: { volumeMl: number; unit: VolumeUnit }): number {
  return input.volumeMl / factorsMl()[input.unit];
}
