import { UNIT_SPACE, NO_NUMBER, formatNumber } from './format-number.ts';
import { ML_PER_FLUID_OUNCE } from '../units/measure-amount.ts';

export type VolumeUnit = 'ml' | 'oz';
export type TemperatureUnit = 'C' | 'F';

/** Quantities that are shown, each with its own sensible number of decimals. */
export type ShownQuantity =
  | 'volumeMl'
  | 'volumeOz'
  | 'massG'
  | 'percent'
  | 'gPerL'
  | 'ratio'
  | 'temperature'
  | 'energy'
  | 'lengthMm'
  | 'densityGPerMl'
  | 'standardDrinks';

/**
 * Decimals from each size up, the largest size first. About three digits: a poured drink is not known better than
 * to a per cent or two.
 */
const DECIMALS: Readonly<Record<ShownQuantity, readonly (readonly [from: number, decimals: number])[]>> = {
  volumeMl: [
    [100, 0],
    [0, 1],
  ],
  volumeOz: [
    [10, 1],
    [0, 2],
  ],
  massG: [
    [100, 0],
    [10, 1],
    [0, 2],
  ],
  percent: [[0, 1]],
  gPerL: [
    [100, 0],
    [0, 1],
  ],
  ratio: [
    [100, 0],
    [0, 1],
  ],
  temperature: [[0, 1]],
  energy: [[0, 0]],
  lengthMm: [[0, 0]],
  densityGPerMl: [[0, 4]],
  standardDrinks: [[0, 1]],
};

/**
 * How many decimals a quantity of this size is shown with.
 *
 * A value that rounds up to the next size is shown like it: 99.97 mL has no decimals, so that it reads `100`.
 */
export function decimalsOf(input: { readonly quantity: ShownQuantity; readonly value: number }): number {
  const steps = DECIMALS[input.quantity];
  const size = Math.abs(input.value);
  const step = steps.find(([from], index) => {
    const finer = steps[index + 1]?.[1];
    return (finer === undefined ? size : Number(size.toFixed(finer))) >= from;
  });
  return step?.[1] ?? 0;
}

/** A number with the decimals of its quantity and, when there is one, its unit. */
export function formatQuantity(input: {
  readonly quantity: ShownQuantity;
  readonly value: number;
  readonly unit: string;
}): string {
  const text = formatNumber({ value: input.value, decimals: decimalsOf(input) });
  return input.unit === '' ? text : `${text}${UNIT_SPACE}${input.unit}`;
}

/** A volume given in mL, shown in ml or in US fluid ounces: `118 ml`, `3.99 oz`. */
export function formatVolume(input: { readonly volumeMl: number; readonly unit: VolumeUnit }): string {
  return input.unit === 'ml'
    ? formatQuantity({ quantity: 'volumeMl', value: input.volumeMl, unit: 'ml' })
    : formatQuantity({ quantity: 'volumeOz', value: input.volumeMl / ML_PER_FLUID_OUNCE, unit: 'oz' });
}

/** A mass in grams: `13.8 g`. */
export function formatMass(massG: number): string {
  return formatQuantity({ quantity: 'massG', value: massG, unit: 'g' });
}

/** Ethanol by volume, 0 to 1, as per cent: `18.2 %`. */
export function formatAbv(abvFraction: number): string {
  return formatPercent(abvFraction);
}

/** Melt water ÷ undiluted volume, 0 to 3, as per cent: `51.9 %`. */
export function formatDilution(dilutionFraction: number): string {
  return formatPercent(dilutionFraction);
}

/** Any fraction as per cent, with one decimal. */
export function formatPercent(fraction: number): string {
  return formatQuantity({ quantity: 'percent', value: fraction * 100, unit: '%' });
}

/** A concentration in grams per litre: `8.4 g/L`. */
export function formatGPerL(gPerL: number): string {
  return formatQuantity({ quantity: 'gPerL', value: gPerL, unit: 'g/L' });
}

/** Sugar to acid: `7.9 : 1`; without acid there is no ratio, and it is `–`. */
export function formatRatio(ratio: number | null): string {
  if (ratio === null) return NO_NUMBER;
  return formatQuantity({ quantity: 'ratio', value: ratio, unit: `:${UNIT_SPACE}1` });
}

/** A temperature given in °C, shown in °C or °F: `−5.2 °C`, `22.6 °F`. */
export function formatTemperature(input: {
  readonly temperatureC: number;
  readonly unit: TemperatureUnit;
}): string {
  const value = input.unit === 'C' ? input.temperatureC : fahrenheitFromCelsius(input.temperatureC);
  return formatQuantity({ quantity: 'temperature', value, unit: `°${input.unit}` });
}

/** Energy in kilocalories: `187 kcal`. */
export function formatEnergy(energyKcal: number): string {
  return formatQuantity({ quantity: 'energy', value: energyKcal, unit: 'kcal' });
}

/** A length in millimetres: `62 mm`. */
export function formatLength(lengthMm: number): string {
  return formatQuantity({ quantity: 'lengthMm', value: lengthMm, unit: 'mm' });
}

/** A density: `1.0385 g/ml`. */
export function formatDensity(densityGPerMl: number): string {
  return formatQuantity({ quantity: 'densityGPerMl', value: densityGPerMl, unit: 'g/ml' });
}

/** A number of standard drinks, an estimate: `1.9`. */
export function formatStandardDrinks(count: number): string {
  return formatQuantity({ quantity: 'standardDrinks', value: count, unit: '' });
}

/** 9/5 of the degree and 32 above, by definition. */
export const FAHRENHEIT_PER_CELSIUS = 1.8;
export const FAHRENHEIT_AT_ZERO_C = 32;

function fahrenheitFromCelsius(temperatureC: number): number {
  return temperatureC * FAHRENHEIT_PER_CELSIUS + FAHRENHEIT_AT_ZERO_C;
}
