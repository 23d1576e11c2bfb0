import { describe, expect, it } from 'vitest';

import {
  apparentBrixFromRefractiveIndex,
  apparentBrixFromSpecificGravity,
} from '#shared/physics/apparent-brix.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import {
  ETHANOL_DENSITY_G_PER_ML,
  densityOfEthanolWater,
  massFractionFromDensity,
  massFractionFromVolumeFraction,
  volumeFractionFromMassFraction,
} from '#shared/physics/ethanol-water.ts';
import {
  brixFromSugarGPerL,
  densityOfSugarSolution,
  sugarGPerLFromBrix,
} from '#shared/physics/sucrose-water.ts';
import {
  brixFromRatioByMass,
  brixFromRatioByVolume,
  ratioByMassFromBrix,
  saturatedBrix,
} from '#shared/physics/syrups.ts';
import { tabarieDensityGPerMl, tabarieVolumeMl, waterBasisVolumeMl } from '#shared/physics/ternary.ts';

const NaNs = [Number.NaN, Number.POSITIVE_INFINITY, -1e-6];

describe('nonsense is refused', () => {
  it.each([
    ['mass fraction', (value: number) => volumeFractionFromMassFraction(value), 1.01],
    ['volume fraction', (value: number) => massFractionFromVolumeFraction(value), 1.01],
    ['density', (value: number) => massFractionFromDensity(value), 1.1],
    [
      'temperature',
      (value: number) => densityOfEthanolWater({ ethanolMassFraction: 0.2, temperatureC: 50 + value }),
      0,
    ],
    ['sugar mass fraction', (value: number) => densityOfSugarSolution(value), 0.9],
    ['sugar per litre', (value: number) => brixFromSugarGPerL(value), 1300],
    ['brix', (value: number) => sugarGPerLFromBrix(value), 86],
    ['ratio by mass', (value: number) => brixFromRatioByMass(value), 6],
    ['ratio by volume', (value: number) => brixFromRatioByVolume(value), 6],
    ['brix of a ratio', (value: number) => ratioByMassFromBrix(value), 86],
    ['temperature of saturation', (value: number) => saturatedBrix(value), 31],
    ['specific gravity', (value: number) => apparentBrixFromSpecificGravity(value), 1.3],
    ['refractive index', (value: number) => apparentBrixFromRefractiveIndex(value), 1.6],
    [
      'strength of a ternary',
      (value: number) => tabarieDensityGPerMl({ abvFraction: value, sugarGPerMl: 0.1 }),
      1.1,
    ],
    [
      'sugar of a ternary',
      (value: number) => tabarieDensityGPerMl({ abvFraction: 0.1, sugarGPerMl: value }),
      2,
    ],
  ])('%s', (_what, call, tooMuch) => {
    for (const value of [...NaNs, tooMuch]) expect(() => call(value), String(value)).toThrow(DomainError);
  });

  it('negative or missing water', () => {
    expect(() => tabarieVolumeMl({ ethanolG: 10, waterG: -5, sugarG: 10 })).toThrow(DomainError);
    expect(() => tabarieVolumeMl({ ethanolG: 10, waterG: Number.NaN, sugarG: 10 })).toThrow(DomainError);
  });
});

describe('ends of ranges', () => {
  it('are exact', () => {
    expect(volumeFractionFromMassFraction(0)).toBe(0);
    expect(volumeFractionFromMassFraction(1)).toBe(1);
    expect(massFractionFromVolumeFraction(0)).toBe(0);
    expect(massFractionFromVolumeFraction(1)).toBe(1);
    expect(massFractionFromDensity(ETHANOL_DENSITY_G_PER_ML)).toBe(1);
    expect(brixFromSugarGPerL(0)).toBe(0);
    expect(saturatedBrix(0)).toBe(64.18);
    expect(saturatedBrix(30)).toBe(68.8);
  });

  it('lie between the rows of the table of saturation', () => {
    expect(saturatedBrix(12.5)).toBeCloseTo((65.58 + 66.53) / 2, 9);
  });

  it('make no volume of no mass', () => {
    expect(tabarieVolumeMl({ ethanolG: 0, waterG: 0, sugarG: 0 })).toBe(0);
    expect(waterBasisVolumeMl({ ethanolG: 0, waterG: 0, sugarG: 0 })).toBe(0);
  });

  it('hold a liquid of ethanol and sugar without water', () => {
    expect(tabarieVolumeMl({ ethanolG: 78.9239, waterG: 0, sugarG: 1 })).toBeGreaterThan(100);
  });
});
