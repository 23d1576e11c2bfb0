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

export function decimalsOf(_input: { readonly quantity: ShownQuantity; readonly value: number }): number {
  throw new Error('being written');
}
export function formatVolume(_input: { readonly volumeMl: number; readonly unit: VolumeUnit }): string {
  throw new Error('being written');
}
export function formatMass(_massG: number): string {
  throw new Error('being written');
}
/** `18.2 %`. */
export function formatAbv(_abvFraction: number): string {
  throw new Error('being written');
}
/** `24.5 %`. */
export function formatDilution(_dilutionFraction: number): string {
  throw new Error('being written');
}
/** `8.4 g/L`. */
export function formatGPerL(_gPerL: number): string {
  throw new Error('being written');
}
/** `7.9 : 1`; without acid there is no ratio: `–`. */
export function formatRatio(_ratio: number | null): string {
  throw new Error('being written');
}
export function formatTemperature(_input: {
  readonly temperatureC: number;
  readonly unit: TemperatureUnit;
}): string {
  throw new Error('being written');
}
export function formatEnergy(_energyKcal: number): string {
  throw new Error('being written');
}
export function formatLength(_lengthMm: number): string {
  throw new Error('being written');
}
export function formatDensity(_densityGPerMl: number): string {
  throw new Error('being written');
}
export function formatStandardDrinks(_count: number): string {
  throw new Error('being written');
}
