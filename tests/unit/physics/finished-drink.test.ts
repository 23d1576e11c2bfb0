import { describe, expect, it } from 'vitest';

import type { Composition } from '#shared/physics/composition.ts';
import { contentsPerMl } from '#shared/physics/contents.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import { finishedDrink } from '#shared/physics/finished-drink.ts';

function aPortion(volumeMl: number, stated: Partial<Composition>, name?: string) {
  const composition = { abvFraction: 0, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null, ...stated };
  return { contentsPerMl: contentsPerMl(composition), volumeMl, ...(name === undefined ? {} : { name }) };
}

const spirit = aPortion(60, { abvFraction: 0.4 });
const lime = aPortion(22.5, { sugarGPerL: 16, acidsGPerL: { citric: 40, malic: 20 } });
const syrup = aPortion(22.5, { sugarGPerL: 615 });
const soda = aPortion(60, {});
const none = { dilution: { kind: 'none' }, topPortions: [], method: 'shake' } as const;

describe('finishedDrink', () => {
  it('adds melt water to the mix and then what is put on top', () => {
    const short = finishedDrink({
      mixPortions: [spirit, lime, syrup],
      topPortions: [],
      dilution: { kind: 'published' },
      method: 'shake',
    });
    const long = finishedDrink({
      mixPortions: [spirit, lime, syrup],
      topPortions: [soda],
      dilution: { kind: 'published' },
      method: 'shake',
    });
    expect(long.meltWaterG).toBe(short.meltWaterG);
    expect(long.undilutedMl).toBe(short.undilutedMl);
    expect(long.topMl).toBe(60);
    expect(long.finalMassG).toBeCloseTo(short.finalMassG + 60 * 0.99820123, 9);
    expect(long.ethanolG).toBe(short.ethanolG);
    expect(long.dilutionKind).toBe('published');
  });

  it('has no ratio without acid, and a ratio of grams with it', () => {
    expect(finishedDrink({ ...none, mixPortions: [spirit, syrup] }).sugarAcidRatio).toBeNull();
    const sour = finishedDrink({ ...none, mixPortions: [spirit, lime, syrup] });
    expect(sour.sugarAcidRatio).toBeCloseTo(sour.sugarGPerL / sour.acidCitricGPerL, 12);
  });

  it('counts no water where a method has no published curve, and says so', () => {
    const made = finishedDrink({
      mixPortions: [spirit],
      topPortions: [],
      dilution: { kind: 'published' },
      method: 'throw',
    });
    expect(made).toMatchObject({ dilutionFraction: 0, meltWaterG: 0, dilutionKind: 'none' });
    expect(made.warnings).toMatchObject([{ code: 'no-published-curve', value: null }]);
  });

  it('does not dilute a drink that is only built on top', () => {
    const made = finishedDrink({
      mixPortions: [],
      topPortions: [soda],
      dilution: { kind: 'published' },
      method: 'shake',
    });
    expect(made).toMatchObject({ undilutedMl: 0, dilutionFraction: 0, dilutionKind: 'none', warnings: [] });
    expect(made.finalMl).toBeCloseTo(60, 9);
    expect(made.undilutedAbvFraction).toBe(0);
  });

  it('passes the warnings of the curve on', () => {
    const weak = finishedDrink({ ...none, mixPortions: [lime], dilution: { kind: 'published' } });
    expect(weak.warnings).toMatchObject([{ code: 'extrapolated', quantity: 'undilutedAbvFraction' }]);
  });

  it('names a liquid whose density and composition hardly belong together', () => {
    const wrong = aPortion(20, { sugarGPerL: 615, densityGPerMl: 1.1 }, 'simple syrup');
    const made = finishedDrink({ ...none, mixPortions: [spirit, wrong] });
    expect(made.warnings).toMatchObject([{ code: 'lighter-than-composition', max: 0.03 }]);
    expect(made.warnings[0]?.detail).toMatch(/^simple syrup is lighter/);
  });

  it('does not call cream wrong', () => {
    const cream = aPortion(30, { sugarGPerL: 29, densityGPerMl: 0.994 }, 'cream');
    expect(finishedDrink({ ...none, mixPortions: [spirit, cream] }).warnings).toEqual([]);
  });

  it('warns where a drink is strong and sweet at once, beyond what the density relation was checked for', () => {
    const liqueur = aPortion(60, { abvFraction: 0.4, sugarGPerL: 240 });
    expect(finishedDrink({ ...none, mixPortions: [liqueur] }).warnings).toMatchObject([
      { code: 'extrapolated', quantity: 'volume by two models, relative difference' },
    ]);
    const diluted = finishedDrink({
      ...none,
      mixPortions: [liqueur],
      dilution: { kind: 'by hand', dilutionFraction: 1 },
    });
    expect(diluted.warnings).toEqual([]);
  });

  it('has no freezing point beyond the tables', () => {
    expect(finishedDrink({ ...none, mixPortions: [syrup] }).freezingPointC).toBeNull();
    expect(finishedDrink({ ...none, mixPortions: [spirit] }).freezingPointC).toBeCloseTo(-23.62, 1);
  });

  it('refuses a drink of nothing, and volumes that are no volumes', () => {
    expect(() => finishedDrink({ ...none, mixPortions: [] })).toThrow(DomainError);
    expect(() => finishedDrink({ ...none, mixPortions: [{ ...spirit, volumeMl: -5 }] })).toThrow(DomainError);
    expect(() => finishedDrink({ ...none, mixPortions: [{ ...spirit, volumeMl: Number.NaN }] })).toThrow(
      DomainError,
    );
    expect(() => finishedDrink({ ...none, mixPortions: [spirit, { ...spirit, volumeMl: -5 }] })).toThrow(
      DomainError,
    );
  });

  it('leaves its inputs alone', () => {
    const mixPortions = Object.freeze([Object.freeze(spirit), Object.freeze(lime)]);
    expect(() => finishedDrink({ ...none, mixPortions })).not.toThrow();
  });
});
