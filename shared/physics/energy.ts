/**
 * Food energy of what is known to be in a drink, by the conversion factors of Regulation (EU) No 1169/2011, Annex XIV.
 *
 * Sugars count as carbohydrate. What is not stated (fat, protein, the rest of a juice) is not counted.
 * Sources: eu-1169-2011 (docs/sources/energy.md).
 */
import { requireNotNegative } from './domain-error.ts';

/** Energy of one gram [kcal/g and kJ/g]. The regulation rounds both, so one is not the other times 4.184. */
export const ENERGY_FACTORS = {
  ethanol: { kcal: 7, kJ: 29 },
  carbohydrate: { kcal: 4, kJ: 17 },
  organicAcid: { kcal: 3, kJ: 13 },
} as const;

/**
 * Food energy of ethanol, sugar and organic acids.
 *
 * Formula:   7 m_e + 4 m_s + 3 m_a [kcal]; 29 m_e + 17 m_s + 13 m_a [kJ]
 * @param input.ethanolG   ethanol [g]
 * @param input.sugarG     sugar [g]
 * @param input.acidG      organic acids, as they are [g]
 * @returns                energy [kcal] and [kJ]
 * Range:     masses that are not negative
 * Accuracy:  that of the factors, about 5 %
 * Limits:    leaves out fat, protein and starch: too low for cream, egg and nut milks. Not a label declaration
 * Source:    Regulation (EU) No 1169/2011, Annex XIV (factors from memory)
 * @example   energyOf({ ethanolG: 10, sugarG: 5, acidG: 1 }).kcal // 93
 */
export function energyOf(input: { ethanolG: number; sugarG: number; acidG: number }): {
  kcal: number;
  kJ: number;
} {
  const ethanolG = requireNotNegative({ quantity: 'ethanolG', value: input.ethanolG });
  const sugarG = requireNotNegative({ quantity: 'sugarG', value: input.sugarG });
  const acidG = requireNotNegative({ quantity: 'acidG', value: input.acidG });
  const { ethanol, carbohydrate, organicAcid } = ENERGY_FACTORS;
  return {
    kcal: ethanolG * ethanol.kcal + sugarG * carbohydrate.kcal + acidG * organicAcid.kcal,
    kJ: ethanolG * ethanol.kJ + sugarG * carbohydrate.kJ + acidG * organicAcid.kJ,
  };
}
