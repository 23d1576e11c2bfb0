import { describe, expect, it } from 'vitest';

import { STANDARD_DRINKS, type StandardDrinkPlace } from '#shared/physics/data/standard-drinks.ts';
import { energyOf } from '#shared/physics/energy.ts';
import { ETHANOL_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import { standardDrinks } from '#shared/physics/standard-drinks.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

describe('standard drinks, from memory', () => {
  const table = readReferenceTable('standard-drinks');
  it.each(table.rows)('$label', (row) => {
    const place = row.text('place') as StandardDrinkPlace;
    expect(STANDARD_DRINKS[place].ethanolG).toBe(row.number('ethanol_g'));
    expect(standardDrinks({ ethanolG: 2 * row.number('ethanol_g'), place })).toBeCloseTo(2, 12);
  });

  it('agree with UK units = mL × % vol ÷ 1000 within the rounding of 7.89 g to 8 g', () => {
    const ethanolG = 175 * 0.13 * ETHANOL_DENSITY_G_PER_ML;
    expect(standardDrinks({ ethanolG, place: 'GB' }) / ((175 * 13) / 1000)).toBeCloseTo(7.892 / 8, 3);
  });

  it('agree with 0.6 US fl oz of ethanol in the United States', () => {
    const ethanolG = 0.6 * 29.5735295625 * ETHANOL_DENSITY_G_PER_ML;
    expect(standardDrinks({ ethanolG, place: 'US' })).toBeCloseTo(1, 2);
  });
});

describe('energy factors of Regulation (EU) No 1169/2011, from memory', () => {
  const table = readReferenceTable('energy-factors');
  it.each(table.rows)('$label', (row) => {
    const massOf = (substance: string) => (row.text('substance') === substance ? 10 : 0);
    const energy = energyOf({
      ethanolG: massOf('ethanol'),
      sugarG: massOf('sugar'),
      acidG: massOf('acid'),
    });
    expect(energy.kcal).toBe(10 * row.number('kcal_per_g'));
    expect(energy.kJ).toBe(10 * row.number('kj_per_g'));
  });
});
