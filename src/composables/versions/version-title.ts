import type { Version } from '#shared/contracts/version.ts';

type Named = Pick<Version, 'specName' | 'variantName' | 'number'>;

/** Name of the drink with its variant, such as `Harbour Sour, long`. */
export function drinkName(named: Pick<Version, 'specName' | 'variantName'>): string {
  return named.variantName === null ? named.specName : `${named.specName}, ${named.variantName}`;
}

/** A version as it is named where several specs meet, such as `Harbour Sour, long · version 3`. */
export function versionTitle(version: Named): string {
  return `${drinkName(version)} · version ${version.number}`;
}
