import { describe, expect, it } from 'vitest';

import { PUBLISHED_CURVES, publishedDilution } from '#shared/physics/dilution.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

function fraction(method: 'shake' | 'stir' | 'build' | 'blend', abvFraction: number): number {
  const dilution = publishedDilution({ method, abvFraction });
  if (!dilution.ok) throw new Error(dilution.reason);
  return dilution.fraction;
}

describe('published dilution curves', () => {
  const table = readReferenceTable('dilution-curves');

  it.each(table.rows)('$label', (row) => {
    const abv = row.number('abv_fraction');
    expect(Math.abs(fraction('shake', abv) - row.number('shaken'))).toBeLessThanOrEqual(table.tolerance);
    expect(Math.abs(fraction('stir', abv) - row.number('stirred'))).toBeLessThanOrEqual(table.tolerance);
  });

  it('give a daiquiri 0.52, not the 0.68 of the copy that dropped a sign', () => {
    expect(fraction('shake', 0.2286)).toBeCloseTo(0.519, 3);
  });

  it('peak at 55.6 and 51.5 % vol', () => {
    expect(PUBLISHED_CURVES.shake!.peakAbvFraction).toBeCloseTo(0.556, 3);
    expect(PUBLISHED_CURVES.stir!.peakAbvFraction).toBeCloseTo(0.515, 3);
  });

  it('give built and blended drinks one value', () => {
    expect(fraction('build', 0.4)).toBe(0.24);
    expect(fraction('blend', 0.2)).toBe(0.9);
  });
});
