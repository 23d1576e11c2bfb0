/**
 * Standard drinks: how many times the grams that a place calls one drink are in this one.
 *
 * An estimate from what was entered, neither a label declaration nor advice. Sources: docs/sources/standard-drinks.md.
 */
import { STANDARD_DRINKS, type StandardDrinkPlace } from './data/standard-drinks.ts';
import { requireNotNegative } from './domain-error.ts';

/**
 * Standard drinks of a place in a mass of ethanol.
 *
 * Formula:   m_e / m_place
 * @param input.ethanolG   ethanol in the drink [g]
 * @param input.place      whose standard drink
 * @returns                number of standard drinks [1]
 * Range:     ethanolG >= 0
 * Accuracy:  that of the definition: the UK rounds 10 mL (7.89 g) to 8 g
 * Limits:    the grams per drink are from memory; some places use more than one figure
 * Source:    shared/physics/data/standard-drinks.ts
 * @example   standardDrinks({ ethanolG: 20, place: 'IE' }) // 2
 */
export function standardDrinks(input: { ethanolG: number; place: StandardDrinkPlace }): number {
  return (
    requireNotNegative({ quantity: 'ethanolG', value: input.ethanolG }) /
    STANDARD_DRINKS[input.place].ethanolG
  );
}
