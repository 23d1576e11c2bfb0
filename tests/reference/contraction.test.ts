import { describe, expect, it } from 'vitest';

import { contentsPerMl } from '#shared/physics/contents.ts';
import { ETHANOL_DENSITY_G_PER_ML, WATER_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import { WATER_CONTENTS_PER_ML, mixContents, volumeMlOfContents } from '#shared/physics/mixing.ts';
import { ethanolWaterVolumeMl } from '#shared/physics/ternary.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

function withWater(input: { volumeMl: number; abvFraction: number; waterMl: number }) {
  const liquid = contentsPerMl({
    abvFraction: input.abvFraction,
    sugarGPerL: 0,
    acidsGPerL: {},
    densityGPerMl: null,
  });
  const contents = mixContents([
    { contentsPerMl: liquid, volumeMl: input.volumeMl },
    { contentsPerMl: WATER_CONTENTS_PER_ML, volumeMl: input.waterMl },
  ]);
  const volumeMl = volumeMlOfContents(contents);
  return { volumeMl, abvFraction: contents.ethanolG / ETHANOL_DENSITY_G_PER_ML / volumeMl };
}

describe('the classical contraction of ethanol and water', () => {
  const table = readReferenceTable('contraction-demonstration');
  it.each(table.rows)('as published: $label', (row) => {
    const { volumeMl } = withWater({
      volumeMl: row.number('ethanol_ml'),
      abvFraction: 1,
      waterMl: row.number('water_ml'),
    });
    expect(Math.abs(volumeMl - row.number('volume_ml'))).toBeLessThanOrEqual(table.tolerance);
  });

  it('is greatest at 46.6 % mass, 3.55 % of the volume of the parts', () => {
    const contraction = (p: number) =>
      1 -
      ethanolWaterVolumeMl({ ethanolG: p, waterG: 1 - p }) /
        (p / ETHANOL_DENSITY_G_PER_ML + (1 - p) / WATER_DENSITY_G_PER_ML);
    const fractions = Array.from({ length: 999 }, (_, index) => (index + 1) / 1000);
    const greatest = fractions.reduce((best, p) => (contraction(p) > contraction(best) ? p : best));
    expect(100 * contraction(greatest)).toBeCloseTo(3.55, 2);
    expect(greatest).toBeCloseTo(0.466, 2);
  });
});

describe('spirit and water, evaluated elsewhere by OIML R 22', () => {
  const table = readReferenceTable('contraction');
  it.each(table.rows)('$label', (row) => {
    const parts = row.number('ethanol_liquid_ml') + row.number('water_ml');
    const mixed = withWater({
      volumeMl: row.number('ethanol_liquid_ml'),
      abvFraction: row.number('ethanol_liquid_percent') / 100,
      waterMl: row.number('water_ml'),
    });
    expect(Math.abs(mixed.volumeMl - row.number('volume_ml'))).toBeLessThanOrEqual(table.tolerance);
    expect(Math.abs(100 * mixed.abvFraction - row.number('abv_percent'))).toBeLessThanOrEqual(0.0006);
    expect(
      Math.abs(100 * (1 - mixed.volumeMl / parts) - row.number('contraction_percent')),
    ).toBeLessThanOrEqual(table.tolerance);
  });
});
