import type { ComparedFigure, FigureDifference } from '../specs/figure-differences.ts';
import { ML_PER_FLUID_OUNCE } from '../units/measure-amount.ts';
import { MINUS, NO_NUMBER, UNIT_SPACE, formatNumber, formatSigned } from './format-number.ts';
import {
  FAHRENHEIT_AT_ZERO_C,
  FAHRENHEIT_PER_CELSIUS,
  type ShownQuantity,
  type TemperatureUnit,
  type VolumeUnit,
  decimalsOf,
} from './format-quantity.ts';

/** What a person chose to read in. */
export interface ShownUnits {
  readonly volumeUnit: VolumeUnit;
  readonly temperatureUnit: TemperatureUnit;
}

type FigureKind = 'volume' | 'percent' | 'gPerL' | 'ratio' | 'massG' | 'energy' | 'temperature' | 'lengthMm';

const KIND_OF_FIGURE: Readonly<Record<ComparedFigure, FigureKind>> = {
  finalMl: 'volume',
  abvFraction: 'percent',
  sugarGPerL: 'gPerL',
  acidCitricGPerL: 'gPerL',
  sugarAcidRatio: 'ratio',
  dilutionFraction: 'percent',
  undilutedMl: 'volume',
  undilutedAbvFraction: 'percent',
  ethanolG: 'massG',
  sugarG: 'massG',
  acidCitricG: 'massG',
  energyKcal: 'energy',
  freezingPointC: 'temperature',
  washLineMm: 'lengthMm',
  headroomMl: 'volume',
};

/** How a kind of figure is shown: shown = stored × scale + offset. */
interface Showing {
  readonly quantity: ShownQuantity;
  readonly scale: number;
  readonly offset: number;
  readonly unit: string;
  /** Unit of a difference, where it is another: per cent differ by points. */
  readonly differenceUnit?: string;
}

const SHOWING: Readonly<Record<Exclude<FigureKind, 'volume' | 'temperature'>, Showing>> = {
  percent: { quantity: 'percent', scale: 100, offset: 0, unit: '%', differenceUnit: 'points' },
  gPerL: { quantity: 'gPerL', scale: 1, offset: 0, unit: 'g/L' },
  ratio: { quantity: 'ratio', scale: 1, offset: 0, unit: `:${UNIT_SPACE}1`, differenceUnit: '' },
  massG: { quantity: 'massG', scale: 1, offset: 0, unit: 'g' },
  energy: { quantity: 'energy', scale: 1, offset: 0, unit: 'kcal' },
  lengthMm: { quantity: 'lengthMm', scale: 1, offset: 0, unit: 'mm' },
};
const IN_ML: Showing = { quantity: 'volumeMl', scale: 1, offset: 0, unit: 'ml' };
const IN_OUNCES: Showing = { quantity: 'volumeOz', scale: 1 / ML_PER_FLUID_OUNCE, offset: 0, unit: 'oz' };
const IN_CELSIUS: Showing = { quantity: 'temperature', scale: 1, offset: 0, unit: '°C' };
const IN_FAHRENHEIT: Showing = {
  quantity: 'temperature',
  scale: FAHRENHEIT_PER_CELSIUS,
  offset: FAHRENHEIT_AT_ZERO_C,
  unit: '°F',
};

/** The units that stored texts, such as the changes of a version, are written in. */
export const METRIC_UNITS: ShownUnits = { volumeUnit: 'ml', temperatureUnit: 'C' };

function showingOf(input: { readonly figure: ComparedFigure } & ShownUnits): Showing {
  const kind = KIND_OF_FIGURE[input.figure];
  if (kind === 'volume') return input.volumeUnit === 'ml' ? IN_ML : IN_OUNCES;
  if (kind === 'temperature') return input.temperatureUnit === 'C' ? IN_CELSIUS : IN_FAHRENHEIT;
  return SHOWING[kind];
}

/** A compared figure as number and unit apart, for `8.4 → 7.6 g/L`. */
export function figureParts(
  input: { readonly figure: ComparedFigure; readonly value: number } & ShownUnits,
): { readonly number: string; readonly unit: string } {
  const { quantity, scale, offset, unit } = showingOf(input);
  const value = input.value * scale + offset;
  return { number: formatNumber({ value, decimals: decimalsOf({ quantity, value }) }), unit };
}

/** One compared figure with its unit, as `figureDifferences` gives it; `–` where there is none. */
export function formatFigure(
  input: { readonly figure: ComparedFigure; readonly value: number | null } & ShownUnits,
): string {
  const { value } = input;
  if (value === null) return NO_NUMBER;
  const { number, unit } = figureParts({ ...input, value });
  return `${number}${UNIT_SPACE}${unit}`;
}

/**
 * A difference to the first version, signed, with its unit: `+0.3 g/L`, `−1.2 points`.
 *
 * `same` where it is too small to be shown, `–` where one of the two has no such figure.
 */
export function formatFigureDifference(
  input: { readonly figure: ComparedFigure; readonly cell: FigureDifference } & ShownUnits,
): string {
  const { value, difference, direction } = input.cell;
  if (value === null || difference === null) return NO_NUMBER;
  if (direction === 'same') return 'same';
  const { quantity, scale, offset, unit, differenceUnit = unit } = showingOf(input);
  const larger = Math.max(Math.abs(value), Math.abs(value - difference)) * scale + offset;
  const text = formatSigned({ value: difference * scale, decimals: decimalsOf({ quantity, value: larger }) });
  return differenceUnit === '' ? text : `${text}${UNIT_SPACE}${differenceUnit}`;
}

/** Smallest difference of a figure that can be seen in what is shown, in the figure's own unit. */
export function shownStep(input: { readonly figure: ComparedFigure; readonly value: number }): number {
  const { quantity, scale } = showingOf({ figure: input.figure, ...METRIC_UNITS });
  return 10 ** -decimalsOf({ quantity, value: input.value * scale }) / scale;
}

/** Digits beyond which only the arithmetic of the machine speaks. */
const FULL_DIGITS = 8;

/** A number with all the digits that were worked out, for those who ask: `158.93127`. */
export function formatFull(input: { readonly value: number; readonly unit: string }): string {
  const number = String(Number(input.value.toPrecision(FULL_DIGITS))).replace('-', MINUS);
  return input.unit === '' ? number : `${number}${UNIT_SPACE}${input.unit}`;
}

/** One compared figure with all its digits, in the unit it is shown in; `–` where there is none. */
export function formatFullFigure(
  input: { readonly figure: ComparedFigure; readonly value: number | null } & ShownUnits,
): string {
  if (input.value === null) return NO_NUMBER;
  const { scale, offset, unit } = showingOf(input);
  return formatFull({ value: input.value * scale + offset, unit });
}
