import { describe, expect, it } from 'vitest';

import { COMMON_GLASSES } from '#shared/physics/data/glasses.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import {
  GLASS_RANGES,
  brimMlOfProfile,
  heightMmOfVolume,
  iceDisplacementMl,
  volumeMlAtHeight,
  washLineOf,
} from '#shared/physics/glass.ts';

const cylinder = Object.freeze([
  { heightMm: 0, radiusMm: 30 },
  { heightMm: 100, radiusMm: 30 },
]);
const cone = Object.freeze([
  { heightMm: 0, radiusMm: 0 },
  { heightMm: 60, radiusMm: 60 },
]);

describe('volume', () => {
  it('of a cylinder is pi r² h, of a cone a third of it', () => {
    expect(brimMlOfProfile(cylinder)).toBeCloseTo((Math.PI * 9 * 10) / 1, 9);
    expect(brimMlOfProfile(cone)).toBeCloseTo((Math.PI * 36 * 6) / 3, 9);
  });

  it('of half a cone is an eighth of it', () => {
    expect(volumeMlAtHeight({ profile: cone, heightMm: 30 })).toBeCloseTo(brimMlOfProfile(cone) / 8, 9);
  });

  it('beyond the brim is the brim', () => {
    expect(volumeMlAtHeight({ profile: cone, heightMm: 500 })).toBeCloseTo(brimMlOfProfile(cone), 9);
  });
});

describe('height', () => {
  it('of nothing is 0, of the brim the whole height', () => {
    expect(heightMmOfVolume({ profile: cone, volumeMl: 0 })).toEqual({ ok: true, heightMm: 0 });
    const full = heightMmOfVolume({ profile: cone, volumeMl: brimMlOfProfile(cone) });
    expect(full.ok && full.heightMm).toBeCloseTo(60, 9);
  });

  it('is no answer when it overflows, and says by how much', () => {
    const over = heightMmOfVolume({ profile: cylinder, volumeMl: brimMlOfProfile(cylinder) + 10 });
    expect(over).toMatchObject({ ok: false, reason: 'overflows' });
    expect(!over.ok && over.overflowMl).toBeCloseTo(10, 9);
  });

  it('steps over a shoulder that has no height', () => {
    const shoulder = [
      { heightMm: 0, radiusMm: 10 },
      { heightMm: 20, radiusMm: 10 },
      { heightMm: 20, radiusMm: 30 },
      { heightMm: 60, radiusMm: 30 },
    ];
    const below = Math.PI * 1 * 2;
    const height = heightMmOfVolume({ profile: shoulder, volumeMl: below + Math.PI * 9 });
    expect(height.ok && height.heightMm).toBeCloseTo(30, 9);
  });
});

describe('ice', () => {
  it('floats: it pushes its own mass aside, and so melts without moving the surface', () => {
    expect(iceDisplacementMl({ iceMassG: 100, drinkDensityGPerMl: 0.998201 })).toBeCloseTo(100 / 0.998201, 9);
    expect(iceDisplacementMl({ iceMassG: 100, drinkDensityGPerMl: 1.1 })).toBeCloseTo(90.909, 3);
  });

  it('sinks in strong spirit and pushes its own volume aside', () => {
    expect(iceDisplacementMl({ iceMassG: 100, drinkDensityGPerMl: 0.85 })).toBeCloseTo(109.09, 2);
  });
});

describe('washLineOf', () => {
  it('says what is left to the brim', () => {
    const { washLine, warnings } = washLineOf({
      profile: cylinder,
      drinkMl: 100,
      drinkDensityGPerMl: 1,
      iceMassG: 80,
    });
    expect(washLine.fillMl).toBeCloseTo(180, 9);
    expect(washLine.headroomMl).toBeCloseTo(brimMlOfProfile(cylinder) - 180, 9);
    expect(warnings).toEqual([]);
  });

  it('stops at the brim when it overflows, with a negative rest and a warning', () => {
    const { washLine, warnings } = washLineOf({
      profile: cylinder,
      drinkMl: 300,
      drinkDensityGPerMl: 1,
      iceMassG: 0,
    });
    expect(washLine.heightMm).toBeCloseTo(100, 9);
    expect(washLine.headroomMl).toBeCloseTo(brimMlOfProfile(cylinder) - 300, 9);
    expect(warnings).toMatchObject([{ code: 'overflows', value: 300 }]);
  });
});

describe('nonsense', () => {
  it.each([
    ['one point', [{ heightMm: 0, radiusMm: 30 }]],
    ['a falling height', [...cylinder, { heightMm: 50, radiusMm: 30 }]],
    [
      'a negative radius',
      [
        { heightMm: 0, radiusMm: -1 },
        { heightMm: 10, radiusMm: 5 },
      ],
    ],
    [
      'a giant',
      [
        { heightMm: 0, radiusMm: 10 },
        { heightMm: 1000, radiusMm: 10 },
      ],
    ],
    [
      'NaN',
      [
        { heightMm: 0, radiusMm: Number.NaN },
        { heightMm: 10, radiusMm: 5 },
      ],
    ],
  ])('%s is refused', (_what, profile) => {
    expect(() => brimMlOfProfile(profile)).toThrow(DomainError);
  });

  it.each([-1, Number.NaN])('a volume of %f is refused', (volumeMl) => {
    expect(() => heightMmOfVolume({ profile: cylinder, volumeMl })).toThrow(DomainError);
  });
});

describe('common glasses', () => {
  it('are more than ten, each with its own key and name', () => {
    expect(COMMON_GLASSES.length).toBeGreaterThanOrEqual(10);
    expect(new Set(COMMON_GLASSES.map((glass) => glass.key)).size).toBe(COMMON_GLASSES.length);
    expect(new Set(COMMON_GLASSES.map((glass) => glass.name)).size).toBe(COMMON_GLASSES.length);
  });

  it.each(COMMON_GLASSES)('$name: the brim volume stated is that of the profile', (glass) => {
    expect(Math.round(brimMlOfProfile(glass.profile))).toBe(glass.brimMl);
    expect(glass.profile.length).toBeLessThanOrEqual(GLASS_RANGES.points.max);
    expect(glass.stemMm).toBeLessThanOrEqual(250);
  });
});
