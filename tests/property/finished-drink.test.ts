import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { dilutionOf, publishedDilution } from '#shared/physics/dilution.ts';
import { WATER_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import { finishedDrink } from '#shared/physics/finished-drink.ts';
import { freezingPointC } from '#shared/physics/freezing.ts';
import { type Portion, addWater, massGOfContents, mixContents } from '#shared/physics/mixing.ts';
import { between, dilutionChoice, fraction, liquid, method, portions } from '#tests/support/arbitraries.ts';

const RELATIVE = 1e-9;

function expectSame(actual: number, expected: number, what: string) {
  expect(Math.abs(actual - expected), what).toBeLessThanOrEqual(RELATIVE * (1 + Math.abs(expected)));
}

const drink = fc.record({
  mixPortions: portions(),
  topPortions: fc.oneof(fc.constant<Portion[]>([]), portions()),
  dilution: dilutionChoice(),
  method: method(),
});

describe('a finished drink', () => {
  it('weighs what went in and what melted', () => {
    fc.assert(
      fc.property(drink, (input) => {
        const made = finishedDrink(Object.freeze(input));
        const parts = massGOfContents(mixContents([...input.mixPortions, ...input.topPortions]));
        expectSame(made.finalMassG, parts + made.meltWaterG, 'mass');
        expectSame(made.meltWaterG, made.meltWaterMl * WATER_DENSITY_G_PER_ML, 'melt water');
      }),
    );
  });

  it('has figures that agree with each other', () => {
    fc.assert(
      fc.property(drink, (input) => {
        const made = finishedDrink(input);
        expectSame(made.finalMassG, made.densityGPerMl * made.finalMl, 'density');
        expectSame(made.ethanolG, made.abvFraction * made.finalMl * 0.7892391233, 'strength');
        expectSame(made.sugarG * 1000, made.sugarGPerL * made.finalMl, 'sugar');
        expectSame(made.acidCitricG * 1000, made.acidCitricGPerL * made.finalMl, 'acid');
        expectSame(made.meltWaterMl, made.dilutionFraction * made.undilutedMl, 'dilution');
        expectSame(
          made.contractionMl,
          made.sumOfPartsMl + made.meltWaterMl + made.topMl - made.finalMl,
          'contraction',
        );
        if (made.sugarAcidRatio !== null) {
          expectSame(made.sugarAcidRatio * made.acidCitricG, made.sugarG, 'ratio');
        }
      }),
    );
  });

  it('is never stronger than its strongest line', () => {
    fc.assert(
      fc.property(portions(), dilutionChoice(), method(), (mixPortions, dilution, how) => {
        const made = finishedDrink({ mixPortions, topPortions: [], dilution, method: how });
        expect(made.abvFraction).toBeLessThanOrEqual(1);
        expect(made.abvFraction).toBeLessThanOrEqual(made.undilutedAbvFraction * (1 + RELATIVE));
      }),
    );
  });

  it('does not care in which order the lines were written', () => {
    fc.assert(
      fc.property(drink, (input) => {
        const reversed = { ...input, mixPortions: [...input.mixPortions].reverse() };
        expectSame(finishedDrink(reversed).finalMl, finishedDrink(input).finalMl, 'volume');
      }),
    );
  });

  it('scales with its serves', () => {
    fc.assert(
      fc.property(drink, between(0.1, 20), (input, factor) => {
        fc.pre(input.dilution.kind !== 'weighed');
        const scale = (parts: readonly Portion[]) =>
          parts.map((part) => ({ ...part, volumeMl: part.volumeMl * factor }));
        const scaled = finishedDrink({
          ...input,
          mixPortions: scale(input.mixPortions),
          topPortions: scale(input.topPortions),
        });
        const made = finishedDrink(input);
        expectSame(scaled.finalMl / factor, made.finalMl, 'volume');
        expectSame(scaled.abvFraction, made.abvFraction, 'strength');
      }),
    );
  });
});

describe('published dilution', () => {
  const curved = fc.constantFrom<'shake' | 'stir'>('shake', 'stir');

  it('never falls as the mix gets stronger, and has no step', () => {
    fc.assert(
      fc.property(curved, fraction(), fraction(), (how, a, b) => {
        const at = (abvFraction: number) => {
          const dilution = publishedDilution({ method: how, abvFraction });
          return dilution.ok ? dilution.fraction : Number.NaN;
        };
        const [weaker, stronger] = [Math.min(a, b), Math.max(a, b)];
        expect(at(stronger)).toBeGreaterThanOrEqual(at(weaker) - 1e-12);
        expect(at(stronger) - at(weaker)).toBeLessThanOrEqual(1.742 * (stronger - weaker) + 1e-12);
      }),
    );
  });

  it('warns outside the strengths it was made for, and only there', () => {
    fc.assert(
      fc.property(curved, fraction(), (how, abvFraction) => {
        const dilution = publishedDilution({ method: how, abvFraction });
        const isInside =
          how === 'shake'
            ? abvFraction >= 0.15 && abvFraction <= 0.35
            : abvFraction >= 0.2 && abvFraction <= 0.45;
        expect(dilution.ok && dilution.warnings.length).toBe(isInside ? 0 : 1);
      }),
    );
  });
});

describe('weighed dilution', () => {
  it('finds the water that was added, whatever was weighed', () => {
    fc.assert(
      fc.property(
        between(10, 500),
        between(0, 300),
        between(0.2, 12),
        between(0.8, 1.3),
        (massG, meltG, serves, density) => {
          const mix = { volumeMl: massG / density, massG, abvFraction: 0.2 };
          const massBeforeG = massG * serves;
          const choice = { kind: 'weighed', massBeforeG, massAfterG: massBeforeG + meltG * serves } as const;
          const dilution = dilutionOf({ choice, method: 'throw', mix });
          expect(dilution.ok).toBe(true);
          if (dilution.ok) {
            expectSame(dilution.fraction * mix.volumeMl * WATER_DENSITY_G_PER_ML, meltG, 'melt water');
          }
        },
      ),
    );
  });
});

describe('freezing point', () => {
  it('is never above that of water, and rises as water is added', () => {
    fc.assert(
      fc.property(liquid(), between(0, 5), (contents, waterG) => {
        const before = freezingPointC(contents);
        const after = freezingPointC(addWater({ contents, waterG }));
        fc.pre(before !== null && after !== null);
        expect(before).toBeLessThanOrEqual(0);
        expect(after).toBeGreaterThanOrEqual(before - 1e-12);
      }),
    );
  });
});
