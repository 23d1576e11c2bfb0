import type { ComparedFigure } from '../specs/figure-differences.ts';
import type { TemperatureUnit, VolumeUnit } from './format-quantity.ts';

/** What a person chose to read in. */
export interface ShownUnits {
  readonly volumeUnit: VolumeUnit;
  readonly temperatureUnit: TemperatureUnit;
}

/** One compared figure with its unit, as `figureDifferences` gives it; null is `–`. */
export function formatFigure(
  _input: { readonly figure: ComparedFigure; readonly value: number | null } & ShownUnits,
): string {
  throw new Error('being written');
}

/** A difference of one compared figure, signed, with its unit: `+0.3 g/L`. */
export function formatFigureDifference(
  _input: { readonly figure: ComparedFigure; readonly difference: number | null } & ShownUnits,
): string {
  throw new Error('being written');
}
