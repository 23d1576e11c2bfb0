import { describe, expect, it } from 'vitest';

import type { Composition } from '#shared/physics/composition.ts';
import {
  REST_VOLUME_ML_PER_G,
  computedDensityGPerMl,
  contentsPerMl,
  densityInUseGPerMl,
  fitOfComposition,
} from '#shared/physics/contents.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import { massGOfContents, volumeMlOfContents } from '#shared/physics/mixing.ts';

function aLiquid(stated: Partial<Composition>): Composition {
  return Object.freeze({ abvFraction: 0, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null, ...stated });
}

describe('contentsPerMl', () => {
  it('is water when nothing is stated', () => {
    expect(contentsPerMl(aLiquid({}))).toMatchObject({ ethanolG: 0, sugarG: 0, restG: 0, residualMl: 0 });
    expect(contentsPerMl(aLiquid({})).waterG).toBeCloseTo(0.9982, 5);
  });

  it('is all ethanol at 100 % vol', () => {
    const contents = contentsPerMl(aLiquid({ abvFraction: 1 }));
    expect(contents.ethanolG).toBeCloseTo(0.789239, 6);
    expect(contents.waterG).toBe(0);
  });

  it('carries what a juice weighs beyond its sugar and acid as rest', () => {
    const lime = aLiquid({ sugarGPerL: 17, acidsGPerL: { citric: 45, malic: 4 }, densityGPerMl: 1.03 });
    const contents = contentsPerMl(lime);
    expect(contents.restG).toBeGreaterThan(0.01);
    expect(contents.residualMl).toBe(0);
    // Rest of 0.62 mL/g raises the density by 0.38 g for each gram, near enough.
    expect(contents.restG * (1 - REST_VOLUME_ML_PER_G)).toBeCloseTo(1.03 - computedDensityGPerMl(lime), 3);
  });

  it('carries what cream lacks in weight as volume, and no rest', () => {
    const contents = contentsPerMl(aLiquid({ sugarGPerL: 29, densityGPerMl: 0.994 }));
    expect(contents.restG).toBe(0);
    expect(contents.residualMl).toBeCloseTo(0.0154, 4);
    expect(massGOfContents(contents)).toBeCloseTo(0.994, 12);
    expect(volumeMlOfContents(contents)).toBeCloseTo(1, 12);
  });

  it.each([
    [{ abvFraction: -0.1 }, 'abvFraction'],
    [{ abvFraction: 1.5 }, 'abvFraction'],
    [{ abvFraction: Number.NaN }, 'abvFraction'],
    [{ sugarGPerL: 1201 }, 'sugarGPerL'],
    [{ acidsGPerL: { malic: -1 } }, 'malic'],
    [{ densityGPerMl: 0.5 }, 'densityGPerMl'],
    [{ densityGPerMl: Number.NaN }, 'densityGPerMl'],
  ])('refuses %j', (stated, quantity) => {
    const attempt = () => contentsPerMl(aLiquid(stated));
    expect(attempt).toThrow(DomainError);
    expect(attempt).toThrow(quantity);
  });

  it.each([
    { abvFraction: 0.9, sugarGPerL: 900 },
    { abvFraction: 0.5, acidsGPerL: { citric: 900 } },
    { abvFraction: 1, sugarGPerL: 1 },
    { sugarGPerL: 1200, acidsGPerL: { citric: 400 } },
    { abvFraction: 0.4, densityGPerMl: 1.79 },
    { sugarGPerL: 600, densityGPerMl: 0.9, abvFraction: 0.5 },
  ])('refuses %j, whose parts do not fit into a litre, and says so without throwing when asked', (stated) => {
    expect(() => contentsPerMl(aLiquid(stated))).toThrow(DomainError);
    expect(fitOfComposition(aLiquid(stated))).toMatchObject({ ok: false, reason: 'does-not-fit' });
  });

  it('says that what fits does', () => {
    expect(fitOfComposition(aLiquid({ abvFraction: 0.4, sugarGPerL: 240 }))).toEqual({ ok: true });
  });
});

describe('density', () => {
  it('in use is the one given, or else computed', () => {
    expect(densityInUseGPerMl(aLiquid({ densityGPerMl: 1.03 }))).toBe(1.03);
    expect(densityInUseGPerMl(aLiquid({}))).toBeCloseTo(0.9982, 5);
  });

  it('computed does not look at the one given', () => {
    expect(computedDensityGPerMl(aLiquid({ densityGPerMl: 1.03 }))).toBeCloseTo(0.9982, 5);
  });
});
