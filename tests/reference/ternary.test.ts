import { describe, expect, it } from 'vitest';

import { contentsPerMl } from '#shared/physics/contents.ts';
import { massFractionFromDensity, volumeFractionFromMassFraction } from '#shared/physics/ethanol-water.ts';
import {
  MODEL_DIFFERENCE_WARNING,
  modelDifference,
  tabarieDensityGPerMl,
  tabarieVolumeMl,
  waterBasisVolumeMl,
} from '#shared/physics/ternary.ts';
import { type ReferenceRow, readReferenceTable } from '#tests/support/reference-table.ts';

/** A litre of the row's liquid as Tabarié sees it, in grams. */
function litre(row: ReferenceRow) {
  const contents = contentsPerMl({
    abvFraction: row.number('volume_percent') / 100,
    sugarGPerL: row.number('sugar_g_per_l'),
    acidsGPerL: {},
    densityGPerMl: null,
  });
  return {
    ethanolG: 1000 * contents.ethanolG,
    waterG: 1000 * contents.waterG,
    sugarG: 1000 * contents.sugarG,
  };
}

describe('ethanol, sugar and water by two models, evaluated elsewhere', () => {
  const table = readReferenceTable('ternary-models');

  it.each(table.rows)('Tabarié: $label', (row) => {
    const density = tabarieDensityGPerMl({
      abvFraction: row.number('volume_percent') / 100,
      sugarGPerMl: row.number('sugar_g_per_l') / 1000,
    });
    expect(Math.abs(1000 * density - row.number('tabarie'))).toBeLessThanOrEqual(table.tolerance);
    expect(tabarieVolumeMl(litre(row))).toBeCloseTo(1000, 8);
  });

  /** The water-basis density of a liquid of the same % vol and g/L: the water is what its own volume leaves. */
  function waterBasisDensity(row: ReferenceRow): number {
    const { ethanolG, sugarG } = litre(row);
    let low = 0;
    let high = 1000;
    for (let step = 0; step < 60; step += 1) {
      const waterG = (low + high) / 2;
      if (waterBasisVolumeMl({ ethanolG, waterG, sugarG }) < 1000) low = waterG;
      else high = waterG;
    }
    return ethanolG + low + sugarG;
  }

  it.each(table.rows)('water basis: $label', (row) => {
    const density = waterBasisDensity(row);
    expect(Math.abs(density - row.number('water_basis'))).toBeLessThanOrEqual(table.tolerance);
    const difference = 100 * (row.number('tabarie') / density - 1);
    expect(Math.abs(difference - row.number('difference_percent'))).toBeLessThanOrEqual(0.001);
  });

  it('differ by less than 0.05 % of volume for finished drinks, 10 to 30 % vol under 150 g/L', () => {
    for (let abv = 10; abv <= 30; abv += 1) {
      for (let sugar = 0; sugar <= 150; sugar += 10) {
        const contents = contentsPerMl({
          abvFraction: abv / 100,
          sugarGPerL: sugar,
          acidsGPerL: {},
          densityGPerMl: null,
        });
        expect(Math.abs(modelDifference(contents)), `${abv} % vol, ${sugar} g/L`).toBeLessThan(0.0005);
      }
    }
  });

  it('differ by more than the warning allows for a liqueur of 40 % vol and 240 g/L, the water basis larger', () => {
    const row = table.rows.find(
      (each) => each.number('volume_percent') === 40 && each.number('sugar_g_per_l') === 240,
    )!;
    expect(modelDifference(litre(row))).toBeGreaterThan(MODEL_DIFFERENCE_WARNING);
    expect(modelDifference(litre(row))).toBeLessThan(0.004);
  });
});

describe('strength read from the density of a sweetened spirit, evaluated elsewhere', () => {
  const table = readReferenceTable('obscuration');
  it.each(table.rows)('$label', (row) => {
    const density = tabarieDensityGPerMl({
      abvFraction: row.number('volume_percent') / 100,
      sugarGPerMl: row.number('sugar_g_per_l') / 1000,
    });
    const apparent = 100 * volumeFractionFromMassFraction(massFractionFromDensity(density));
    expect(Math.abs(apparent - row.number('apparent_volume_percent'))).toBeLessThanOrEqual(table.tolerance);
  });
});
