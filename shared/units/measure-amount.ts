import type { Amount } from './amount-units.ts';
import type { HouseMeasures } from './house-measures.ts';

/** How much an amount is, in internal units. Mass and pieces need the ingredient to become a volume. */
export type AmountMeasure =
  | { readonly kind: 'volume'; readonly volumeMl: number }
  | { readonly kind: 'mass'; readonly massG: number }
  | { readonly kind: 'pieces'; readonly pieces: number };

/** 10 mL exactly: centi is a hundredth, a millilitre a thousandth of a litre (SI). */
export const ML_PER_CENTILITRE = 10;

/** US fluid ounce, 1/128 of a gallon of 231 cubic inches of 2.54 cm (NIST Handbook 44, Appendix C): exact [mL]. */
export const ML_PER_FLUID_OUNCE = 29.5735295625;

/**
 * Turns an amount into millilitres, grams or pieces.
 *
 * @param input.amount          the amount as written
 * @param input.houseMeasures   what the team's dash, bar spoon and drop hold [mL]
 * @param input.partMl          what one part is in this spec [mL]
 * @returns                     volume [mL], mass [g] or pieces
 * Accuracy:  exact for ml, cl and oz; dash, bar spoon and drop are as good as the team's setting
 */
export function measureOfAmount(input: {
  readonly amount: Amount;
  readonly houseMeasures: HouseMeasures;
  readonly partMl: number;
}): AmountMeasure {
  const { value, unit } = input.amount;
  switch (unit) {
    case 'g':
      return { kind: 'mass', massG: value };
    case 'piece':
      return { kind: 'pieces', pieces: value };
    case 'part':
      return { kind: 'volume', volumeMl: value * input.partMl };
    case 'dash':
      return { kind: 'volume', volumeMl: value * input.houseMeasures.dashMl };
    case 'bar spoon':
      return { kind: 'volume', volumeMl: value * input.houseMeasures.barSpoonMl };
    case 'drop':
      return { kind: 'volume', volumeMl: value * input.houseMeasures.dropMl };
    case 'ml':
    case 'cl':
    case 'oz':
      return { kind: 'volume', volumeMl: value * ML_OF_UNIT[unit] };
  }
}

const ML_OF_UNIT = { ml: 1, cl: ML_PER_CENTILITRE, oz: ML_PER_FLUID_OUNCE } as const;
