import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { brimMlOfProfile, heightMmOfVolume, volumeMlAtHeight, washLineOf } from '#shared/physics/glass.ts';
import { between, fraction, profile } from '#tests/support/arbitraries.ts';

function heightMm(input: Parameters<typeof heightMmOfVolume>[0]): number {
  const height = heightMmOfVolume(input);
  if (!height.ok) throw new Error(height.reason);
  return height.heightMm;
}

describe('wash line', () => {
  it('is the inverse of the volume to a height', () => {
    fc.assert(
      fc.property(profile(), fraction(), (glass, part) => {
        const volumeMl = part * brimMlOfProfile(Object.freeze(glass));
        const height = heightMm({ profile: glass, volumeMl });
        expect(volumeMlAtHeight({ profile: glass, heightMm: height })).toBeCloseTo(volumeMl, 6);
      }),
    );
  });

  it('rises with what is poured', () => {
    fc.assert(
      fc.property(profile(), fraction(), fraction(), (glass, a, b) => {
        const brimMl = brimMlOfProfile(glass);
        const [less, more] = [Math.min(a, b) * brimMl, Math.max(a, b) * brimMl];
        expect(heightMm({ profile: glass, volumeMl: more })).toBeGreaterThanOrEqual(
          heightMm({ profile: glass, volumeMl: less }) - 1e-9,
        );
      }),
    );
  });

  it('has no step where one piece of the wall meets the next', () => {
    fc.assert(
      fc.property(profile(), (glass) => {
        for (const { heightMm: join } of glass.slice(1, -1)) {
          const below = volumeMlAtHeight({ profile: glass, heightMm: join - 1e-7 });
          const above = volumeMlAtHeight({ profile: glass, heightMm: join + 1e-7 });
          expect(above - below).toBeLessThan(1e-5);
          expect(above).toBeGreaterThanOrEqual(below);
        }
      }),
    );
  });

  it('is higher with ice, and what is left to the brim less', () => {
    fc.assert(
      fc.property(
        profile(),
        fraction(),
        between(1, 300),
        between(0.85, 1.2),
        (glass, part, iceMassG, density) => {
          const base = {
            profile: glass,
            drinkMl: part * brimMlOfProfile(glass),
            drinkDensityGPerMl: density,
          };
          const without = washLineOf({ ...base, iceMassG: 0 }).washLine;
          const withIce = washLineOf({ ...base, iceMassG });
          expect(withIce.washLine.heightMm).toBeGreaterThanOrEqual(without.heightMm);
          expect(withIce.washLine.headroomMl).toBeLessThan(without.headroomMl);
          expect(withIce.warnings).toHaveLength(withIce.washLine.headroomMl < 0 ? 1 : 0);
        },
      ),
    );
  });

  it('of a fine stack of cylinders is the same', () => {
    fc.assert(
      fc.property(profile(), (glass) => {
        const top = glass.at(-1)!.heightMm;
        const slices = 4000;
        let sumMl = 0;
        for (let slice = 0; slice < slices; slice += 1) {
          const height = ((slice + 0.5) / slices) * top;
          const upper = glass.findIndex((point) => point.heightMm >= height);
          const [a, b] = [glass[upper - 1]!, glass[upper]!];
          const radius =
            a.radiusMm + ((b.radiusMm - a.radiusMm) * (height - a.heightMm)) / (b.heightMm - a.heightMm);
          sumMl += (Math.PI * radius * radius * (top / slices)) / 1000;
        }
        expect(Math.abs(sumMl / brimMlOfProfile(glass) - 1)).toBeLessThan(2e-3);
      }),
      { numRuns: 50 },
    );
  });
});
