import { describe, expect, it } from 'vitest';

import { DEFAULT_RATIOS, balanceExtent, balancePoint, ratioRays } from '#shared/specs/balance.ts';
import { frozen, someFigures } from '#tests/support/builders.ts';

describe('the balance field', () => {
  it('has acid on one axis and sugar on the other', () => {
    const figures = someFigures({ acidCitricGPerL: 8.4, sugarGPerL: 90 });
    expect(balancePoint(figures)).toEqual({ acidCitricGPerL: 8.4, sugarGPerL: 90 });
  });

  it('is never smaller than where most drinks lie', () => {
    expect(balanceExtent([])).toEqual({ maxAcidCitricGPerL: 10, maxSugarGPerL: 120 });
  });

  it('grows by whole steps with what lies outside, and leaves room beyond it', () => {
    const points = frozen([
      { acidCitricGPerL: 12, sugarGPerL: 30 },
      { acidCitricGPerL: 1, sugarGPerL: 140 },
    ]);
    expect(balanceExtent(points)).toEqual({ maxAcidCitricGPerL: 14, maxSugarGPerL: 160 });
  });

  it('has rays that leave it at its top or at its side', () => {
    const extent = { maxAcidCitricGPerL: 10, maxSugarGPerL: 120 };
    expect(ratioRays({ extent, ratios: [6, 12, 24] })).toEqual([
      { ratio: 6, end: { acidCitricGPerL: 10, sugarGPerL: 60 } },
      { ratio: 12, end: { acidCitricGPerL: 10, sugarGPerL: 120 } },
      { ratio: 24, end: { acidCitricGPerL: 5, sugarGPerL: 120 } },
    ]);
    expect(ratioRays({ extent }).map((ray) => ray.ratio)).toEqual([...DEFAULT_RATIOS]);
  });
});
