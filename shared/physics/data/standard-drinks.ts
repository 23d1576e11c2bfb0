/**
 * Grams of ethanol that a place calls one standard drink. None of these was read in the text of its authority: they are from
 * memory, marked by how sure. A standard drink is a unit of counting, never advice on how much to drink.
 * Source ids: who-audit, kalinowski-2016 (docs/sources/standard-drinks.md).
 */

/** ISO 3166-1 codes of the places whose standard drink is known, and WHO for the AUDIT questionnaire's. */
export const STANDARD_DRINK_PLACES = [
  'GB',
  'IE',
  'US',
  'CA',
  'AU',
  'NZ',
  'FR',
  'ES',
  'IT',
  'PT',
  'NL',
  'PL',
  'DE',
  'AT',
  'CH',
  'DK',
  'SE',
  'NO',
  'FI',
  'IS',
  'MX',
  'CL',
  'JP',
  'IN',
  'WHO',
] as const;
export type StandardDrinkPlace = (typeof STANDARD_DRINK_PLACES)[number];

export interface StandardDrink {
  /** Name of the place, in English. */
  readonly name: string;
  /** What the place calls it. */
  readonly unit: 'unit' | 'standard drink';
  /** Ethanol in one [g]. */
  readonly ethanolG: number;
  /** Other figures in use in the same place [g]. */
  readonly alsoG: readonly number[];
  readonly source: string;
  readonly sureness: 'well known' | 'less sure';
}

const OWN_AUTHORITY = 'national health authority, from memory';
const SURVEY = 'Kalinowski and Humphreys 2016, survey of governmental definitions, from memory';

function place(
  name: string,
  ethanolG: number,
  source: string,
  sureness: StandardDrink['sureness'],
  alsoG: readonly number[] = [],
): StandardDrink {
  return { name, unit: 'standard drink', ethanolG, alsoG, source, sureness };
}

export const STANDARD_DRINKS: Readonly<Record<StandardDrinkPlace, StandardDrink>> = {
  GB: { ...place('United Kingdom', 8, `${OWN_AUTHORITY}: 10 ml of ethanol`, 'well known'), unit: 'unit' },
  IE: place('Ireland', 10, OWN_AUTHORITY, 'well known'),
  US: place('United States', 14, `${OWN_AUTHORITY}: 0.6 US fl oz of ethanol`, 'well known'),
  CA: place('Canada', 13.45, OWN_AUTHORITY, 'well known'),
  AU: place('Australia', 10, OWN_AUTHORITY, 'well known'),
  NZ: place('New Zealand', 10, OWN_AUTHORITY, 'well known'),
  FR: place('France', 10, SURVEY, 'well known'),
  ES: place('Spain', 10, SURVEY, 'well known'),
  IT: place('Italy', 12, SURVEY, 'less sure', [10]),
  PT: place('Portugal', 10, SURVEY, 'less sure', [12]),
  NL: place('Netherlands', 10, SURVEY, 'well known'),
  PL: place('Poland', 10, SURVEY, 'less sure'),
  DE: place('Germany', 12, SURVEY, 'less sure', [10]),
  AT: place('Austria', 20, SURVEY, 'less sure'),
  CH: place('Switzerland', 12, SURVEY, 'less sure', [10]),
  DK: place('Denmark', 12, SURVEY, 'well known'),
  SE: place('Sweden', 12, SURVEY, 'less sure', [10]),
  NO: place('Norway', 12, SURVEY, 'less sure'),
  FI: place('Finland', 12, SURVEY, 'well known'),
  IS: place('Iceland', 8, SURVEY, 'less sure'),
  MX: place('Mexico', 13, SURVEY, 'less sure'),
  CL: place('Chile', 14, SURVEY, 'less sure'),
  JP: place('Japan', 20, OWN_AUTHORITY, 'well known', [10]),
  IN: place('India', 10, SURVEY, 'less sure'),
  WHO: place('WHO (AUDIT)', 10, 'WHO, AUDIT questionnaire, from memory', 'well known'),
};
