import { describe, expect, it } from 'vitest';

import { METHODS, dilutionOf, publishedDilution, weighedDilution } from '#shared/physics/dilution.ts';
import { DomainError } from '#shared/physics/domain-error.ts';

const mix = Object.freeze({ volumeMl: 100, massG: 102, abvFraction: 0.25 });

describe('published dilution', () => {
  it.each(['throw', 'swizzle', 'pre-batch'] as const)('%s has no published curve, and says so', (method) => {
    expect(publishedDilution({ method, abvFraction: 0.25 })).toEqual({
      ok: false,
      reason: 'no-published-curve',
      method,
    });
  });

  it.each(METHODS)('%s answers one way or the other', (method) => {
    const dilution = publishedDilution({ method, abvFraction: 0.25 });
    expect(dilution.ok ? dilution.fraction > 0 : dilution.method === method).toBe(true);
  });

  it('warns below its strengths with the value all the same', () => {
    const dilution = publishedDilution({ method: 'shake', abvFraction: 0.12 });
    expect(dilution.ok && dilution.fraction).toBeCloseTo(0.3895, 4);
    expect(dilution.ok && dilution.warnings).toMatchObject([
      { code: 'extrapolated', quantity: 'undilutedAbvFraction', value: 0.12, min: 0.15, max: 0.35 },
    ]);
  });

  it('keeps the greatest dilution beyond the top of the parabola, and says that', () => {
    const at = (abvFraction: number) => publishedDilution({ method: 'stir', abvFraction });
    const top = at(0.515);
    const beyond = at(0.9);
    expect(beyond.ok && top.ok && beyond.fraction - top.fraction).toBeCloseTo(0, 5);
    expect(beyond.ok && beyond.warnings[0]?.detail).toContain('greatest dilution');
  });

  it('does not warn for a method with one value', () => {
    expect(publishedDilution({ method: 'build', abvFraction: 0.6 })).toEqual({
      ok: true,
      fraction: 0.24,
      warnings: [],
    });
  });

  it.each([-0.1, 1.1, Number.NaN])('refuses a strength of %f', (abvFraction) => {
    expect(() => publishedDilution({ method: 'shake', abvFraction })).toThrow(DomainError);
  });
});

describe('weighed dilution', () => {
  it('takes the gain in mass for melt water', () => {
    const dilution = weighedDilution({ massBeforeG: 102, massAfterG: 154.5, mix });
    expect(dilution.fraction).toBeCloseTo(52.5 / 0.998201 / 100, 6);
    expect(dilution.warnings).toEqual([]);
  });

  it('counts none where mass was lost, with a warning', () => {
    const dilution = weighedDilution({ massBeforeG: 102, massAfterG: 100, mix });
    expect(dilution.fraction).toBe(0);
    expect(dilution.warnings).toMatchObject([{ code: 'mass-lost', value: 100, min: 102 }]);
  });

  it('scales another batch to the lines, with a warning', () => {
    const dilution = weighedDilution({ massBeforeG: 204, massAfterG: 309, mix });
    expect(dilution.fraction).toBeCloseTo(52.5 / 0.998201 / 100, 6);
    expect(dilution.warnings).toMatchObject([{ code: 'extrapolated', quantity: 'massBeforeG' }]);
  });

  it.each([
    [0, 100],
    [100, -1],
    [Number.NaN, 100],
    [100, 1e9],
  ])('refuses masses of %f and %f', (massBeforeG, massAfterG) => {
    expect(() => weighedDilution({ massBeforeG, massAfterG, mix })).toThrow(DomainError);
  });
});

describe('dilution by choice', () => {
  it('follows the choice', () => {
    const of = (choice: Parameters<typeof dilutionOf>[0]['choice']) =>
      dilutionOf({ choice, method: 'shake', mix });
    expect(of({ kind: 'none' })).toEqual({ ok: true, fraction: 0, warnings: [] });
    expect(of({ kind: 'by hand', dilutionFraction: 0.3 })).toEqual({ ok: true, fraction: 0.3, warnings: [] });
    expect(of({ kind: 'published' })).toEqual(publishedDilution({ method: 'shake', abvFraction: 0.25 }));
    expect(of({ kind: 'weighed', massBeforeG: 102, massAfterG: 150 })).toEqual(
      weighedDilution({ massBeforeG: 102, massAfterG: 150, mix }),
    );
  });

  it.each([-0.1, 3.1, Number.NaN])('refuses %f by hand', (dilutionFraction) => {
    expect(() => dilutionOf({ choice: { kind: 'by hand', dilutionFraction }, method: 'shake', mix })).toThrow(
      DomainError,
    );
  });
});
