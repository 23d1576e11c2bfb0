import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  densityFromVolumeFraction,
  ethanolWaterDensityAt20,
  massFractionFromDensity,
  massFractionFromVolumeFraction,
  volumeFractionFromMassFraction,
} from '#shared/physics/ethanol-water.ts';
import {
  BRIX_RANGE,
  brixFromSugarGPerL,
  densityAtConcentration,
  sugarGPerLFromBrix,
} from '#shared/physics/sucrose-water.ts';
import {
  SUGAR_TO_WATER_RANGE,
  brixFromRatioByMass,
  brixFromRatioByVolume,
  ratioByMassFromBrix,
  ratioByVolumeFromBrix,
} from '#shared/physics/syrups.ts';
import { unitFromVolumeMl, volumeMlFromUnit } from '#shared/units/volume-units.ts';
import { between, fraction, volumeMl } from '#tests/support/arbitraries.ts';

describe('conversions come back to where they started', () => {
  it('strength: volume fraction, mass fraction and density', () => {
    fc.assert(
      fc.property(fraction(), (q) => {
        const p = massFractionFromVolumeFraction(q);
        expect(volumeFractionFromMassFraction(p)).toBeCloseTo(q, 12);
        expect(massFractionFromDensity(ethanolWaterDensityAt20(p))).toBeCloseTo(p, 11);
      }),
    );
  });

  it('sugar: degrees Brix and grams per litre', () => {
    fc.assert(
      fc.property(between(BRIX_RANGE.min, BRIX_RANGE.max), (brix) => {
        expect(brixFromSugarGPerL(sugarGPerLFromBrix(brix))).toBeCloseTo(brix, 9);
      }),
    );
  });

  it('syrups: ratio by mass and by volume', () => {
    fc.assert(
      fc.property(between(SUGAR_TO_WATER_RANGE.min, SUGAR_TO_WATER_RANGE.max), (ratio) => {
        expect(ratioByMassFromBrix(brixFromRatioByMass(ratio))).toBeCloseTo(ratio, 9);
        expect(ratioByVolumeFromBrix(brixFromRatioByVolume(ratio))).toBeCloseTo(ratio, 9);
      }),
    );
  });

  it('volumes: ml, cl and oz', () => {
    fc.assert(
      fc.property(volumeMl(), fc.constantFrom('ml', 'cl', 'oz'), (volume, unit) => {
        const value = unitFromVolumeMl({ volumeMl: volume, unit });
        expect(volumeMlFromUnit({ value, unit })).toBeCloseTo(volume, 9);
      }),
    );
  });
});

describe('more is more', () => {
  const pair = fc.tuple(fraction(), fraction()).filter(([a, b]) => Math.abs(a - b) > 1e-9);

  it('more ethanol is lighter', () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        const [weaker, stronger] = [Math.min(a, b), Math.max(a, b)];
        expect(densityFromVolumeFraction(stronger)).toBeLessThan(densityFromVolumeFraction(weaker));
      }),
    );
  });

  it('more sugar is heavier', () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        const [thinner, thicker] = [Math.min(a, b), Math.max(a, b)];
        expect(densityAtConcentration(thicker).densityGPerMl).toBeGreaterThan(
          densityAtConcentration(thinner).densityGPerMl,
        );
      }),
    );
  });
});
