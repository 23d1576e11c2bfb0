import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { totalAcid } from '#shared/physics/acids.ts';
import { ACID_KEYS } from '#shared/physics/composition.ts';
import { contentsPerMl, densityInUseGPerMl } from '#shared/physics/contents.ts';
import { ETHANOL_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import {
  WATER_CONTENTS_PER_ML,
  addWater,
  contractionMl,
  massGOfContents,
  mixContents,
  volumeMlOfContents,
} from '#shared/physics/mixing.ts';
import { waterBasisVolumeMl, tabarieVolumeMl } from '#shared/physics/ternary.ts';
import { between, composition, fraction, liquid, portions, volumeMl } from '#tests/support/arbitraries.ts';

const RELATIVE = 1e-10;

function expectSame(actual: number, expected: number, what: string) {
  expect(Math.abs(actual - expected), what).toBeLessThanOrEqual(RELATIVE * (1 + Math.abs(expected)));
}

describe('a liquid', () => {
  it('holds exactly the ethanol, sugar and acid that were stated, in exactly one millilitre', () => {
    fc.assert(
      fc.property(composition(), (stated) => {
        const contents = contentsPerMl(Object.freeze(stated));
        expectSame(contents.ethanolG, stated.abvFraction * ETHANOL_DENSITY_G_PER_ML, 'ethanol');
        expectSame(contents.sugarG, stated.sugarGPerL / 1000, 'sugar');
        for (const key of ACID_KEYS) {
          expectSame(contents.acidsG[key], (stated.acidsGPerL[key] ?? 0) / 1000, key);
        }
        expectSame(volumeMlOfContents(contents), 1, 'volume');
      }),
    );
  });

  it('has exactly the density that was given, or computed', () => {
    fc.assert(
      fc.property(composition(), (stated) => {
        expectSame(massGOfContents(contentsPerMl(stated)), densityInUseGPerMl(stated), 'density');
      }),
    );
  });

  it('never holds less than nothing of anything', () => {
    fc.assert(
      fc.property(liquid(), (contents) => {
        const { ethanolG, waterG, sugarG, restG } = contents;
        for (const massG of [ethanolG, waterG, sugarG, restG]) expect(massG).toBeGreaterThanOrEqual(0);
        expect(contents.residualMl).toBeGreaterThanOrEqual(-RELATIVE);
        expect(contents.restG === 0 || Math.abs(contents.residualMl) < RELATIVE).toBe(true);
      }),
    );
  });

  it('does not change when it is mixed with itself', () => {
    fc.assert(
      fc.property(liquid(), fc.array(volumeMl(), { minLength: 1, maxLength: 6 }), (contents, volumes) => {
        const mixed = mixContents(volumes.map((each) => ({ contentsPerMl: contents, volumeMl: each })));
        const sumMl = volumes.reduce((sum, each) => sum + each, 0);
        expectSame(volumeMlOfContents(mixed) / sumMl, 1, 'volume');
        expectSame(mixed.ethanolG / sumMl, contents.ethanolG, 'ethanol');
        expectSame(massGOfContents(mixed) / sumMl, massGOfContents(contents), 'density');
      }),
    );
  });
});

describe('mixing', () => {
  it('conserves every mass', () => {
    fc.assert(
      fc.property(portions(), (parts) => {
        const mixed = mixContents(Object.freeze(parts));
        const sum = (of: (contents: typeof mixed) => number) =>
          parts.reduce((total, part) => total + part.volumeMl * of(part.contentsPerMl), 0);
        expectSame(
          mixed.ethanolG,
          sum((each) => each.ethanolG),
          'ethanol',
        );
        expectSame(
          mixed.waterG,
          sum((each) => each.waterG),
          'water',
        );
        expectSame(
          mixed.sugarG,
          sum((each) => each.sugarG),
          'sugar',
        );
        expectSame(
          mixed.restG,
          sum((each) => each.restG),
          'rest',
        );
        expectSame(
          totalAcid(mixed.acidsG),
          sum((each) => totalAcid(each.acidsG)),
          'acid',
        );
        expectSame(massGOfContents(mixed), sum(massGOfContents), 'mass');
      }),
    );
  });

  it('is independent of the order', () => {
    const shuffled = portions().chain((parts) =>
      fc.tuple(
        fc.constant(parts),
        fc.shuffledSubarray(parts, { minLength: parts.length, maxLength: parts.length }),
      ),
    );
    fc.assert(
      fc.property(shuffled, ([parts, other]) => {
        const [one, two] = [mixContents(parts), mixContents(other)];
        expectSame(massGOfContents(one), massGOfContents(two), 'mass');
        expectSame(volumeMlOfContents(one) / volumeMlOfContents(two), 1, 'volume');
      }),
    );
  });

  it('in two steps is the same as in one', () => {
    fc.assert(
      fc.property(portions(), portions(), (first, second) => {
        const inSteps = mixContents([
          { contentsPerMl: mixContents(first), volumeMl: 1 },
          { contentsPerMl: mixContents(second), volumeMl: 1 },
        ]);
        const atOnce = mixContents([...first, ...second]);
        expectSame(volumeMlOfContents(inSteps) / volumeMlOfContents(atOnce), 1, 'volume');
      }),
    );
  });

  it('of twice as much gives twice the volume', () => {
    fc.assert(
      fc.property(portions(), between(0.01, 100), (parts, factor) => {
        const scaled = parts.map((part) => ({ ...part, volumeMl: part.volumeMl * factor }));
        const ratio = volumeMlOfContents(mixContents(scaled)) / volumeMlOfContents(mixContents(parts));
        expectSame(ratio / factor, 1, 'ratio');
      }),
    );
  });
});

describe('water', () => {
  it('never raises a concentration', () => {
    fc.assert(
      fc.property(portions(), between(0, 2000), (parts, waterG) => {
        const before = mixContents(parts);
        const after = addWater({ contents: before, waterG });
        const [volumeBefore, volumeAfter] = [volumeMlOfContents(before), volumeMlOfContents(after)];
        const slack = 1 + RELATIVE;
        expect(after.ethanolG / volumeAfter).toBeLessThanOrEqual((before.ethanolG / volumeBefore) * slack);
        expect(after.sugarG / volumeAfter).toBeLessThanOrEqual((before.sugarG / volumeBefore) * slack);
        expect(totalAcid(after.acidsG) / volumeAfter).toBeLessThanOrEqual(
          (totalAcid(before.acidsG) / volumeBefore) * slack,
        );
      }),
    );
  });

  const spirit = (abvFraction: number) =>
    contentsPerMl({ abvFraction, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null });

  it('with ethanol never makes more than the parts at 20 C', () => {
    fc.assert(
      fc.property(volumeMl(), volumeMl(), (ethanolMl, waterMl) => {
        const contraction = contractionMl([
          { contentsPerMl: spirit(1), volumeMl: ethanolMl },
          { contentsPerMl: WATER_CONTENTS_PER_ML, volumeMl: waterMl },
        ]);
        expect(contraction).toBeGreaterThanOrEqual(-RELATIVE * (ethanolMl + waterMl));
        expect(contraction).toBeLessThanOrEqual(0.0356 * (ethanolMl + waterMl));
      }),
    );
  });

  // Ethanol takes up least room near 15 % vol, so weak spirits and water swell a little: at most 0.15 %, at 28 % vol.
  it('with a spirit of any strength makes at most 0.16 % more than the parts', () => {
    fc.assert(
      fc.property(fraction(), fraction(), volumeMl(), volumeMl(), (one, other, oneMl, otherMl) => {
        const contraction = contractionMl([
          { contentsPerMl: spirit(one), volumeMl: oneMl },
          { contentsPerMl: spirit(other), volumeMl: otherMl },
        ]);
        expect(contraction).toBeGreaterThanOrEqual(-0.0016 * (oneMl + otherMl));
      }),
    );
  });
});

describe('the two models of ethanol, sugar and water', () => {
  const masses = fc.record({ ethanolG: between(0, 500), waterG: between(0, 500), sugarG: between(0, 500) });

  it('are the same without sugar and without ethanol', () => {
    fc.assert(
      fc.property(masses, ({ ethanolG, waterG, sugarG }) => {
        for (const one of [
          { ethanolG, waterG, sugarG: 0 },
          { ethanolG: 0, waterG, sugarG },
        ]) {
          expectSame(tabarieVolumeMl(one), waterBasisVolumeMl(one), 'volume');
        }
      }),
    );
  });

  it('join the pure limits without a step', () => {
    fc.assert(
      fc.property(masses, ({ ethanolG, waterG, sugarG }) => {
        const trace = 1e-6;
        const step = (a: Parameters<typeof tabarieVolumeMl>[0], b: typeof a) =>
          Math.abs(tabarieVolumeMl(a) - tabarieVolumeMl(b));
        expect(step({ ethanolG, waterG, sugarG: 0 }, { ethanolG, waterG, sugarG: trace })).toBeLessThan(1e-5);
        expect(step({ ethanolG: 0, waterG, sugarG }, { ethanolG: trace, waterG, sugarG })).toBeLessThan(1e-5);
      }),
    );
  });

  it('give a volume between the ends of the proved bracket', () => {
    fc.assert(
      fc.property(masses, (each) => {
        const volume = tabarieVolumeMl(each);
        const additive =
          each.ethanolG / ETHANOL_DENSITY_G_PER_ML + each.waterG / 0.99820123 + each.sugarG / 1.55190973;
        expect(volume).toBeLessThanOrEqual(additive * (1 + RELATIVE));
        expect(volume).toBeGreaterThanOrEqual(each.ethanolG / ETHANOL_DENSITY_G_PER_ML / (1 + RELATIVE));
      }),
    );
  });
});

describe('a density given at the edge of what the composition explains', () => {
  it('changes nothing by a step', () => {
    fc.assert(
      fc.property(composition(), (stated) => {
        const computed = contentsPerMl({ ...stated, densityGPerMl: null });
        const density = massGOfContents(computed);
        fc.pre(density > 0.79 && density < 1.75 && computed.waterG > 1e-3);
        for (const nudge of [-1e-7, 1e-7]) {
          const near = contentsPerMl({ ...stated, densityGPerMl: density + nudge });
          expect(Math.abs(near.waterG - computed.waterG)).toBeLessThan(1e-6);
          expect(near.restG + near.residualMl).toBeLessThan(1e-6);
        }
      }),
    );
  });
});
