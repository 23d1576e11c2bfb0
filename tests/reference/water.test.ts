import { describe, expect, it } from 'vitest';

import { WATER_DENSITY_G_PER_ML, densityOfEthanolWater } from '#shared/physics/ethanol-water.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

describe('water: OIML R 22 without ethanol against CIPM 2001, which we do not use', () => {
  const table = readReferenceTable('cipm-water');

  it.each(table.rows)('$label', (row) => {
    const density =
      1000 * densityOfEthanolWater({ ethanolMassFraction: 0, temperatureC: row.number('temperature_c') });
    expect(Math.abs(density - row.number('density'))).toBeLessThanOrEqual(table.tolerance);
  });

  it('lies 6 ppm below CIPM at 20 C, and 2 ppm below Kell (1975)', () => {
    expect(998.207 / (1000 * WATER_DENSITY_G_PER_ML) - 1).toBeCloseTo(6e-6, 6);
    expect(998.203 / (1000 * WATER_DENSITY_G_PER_ML) - 1).toBeCloseTo(2e-6, 6);
  });
});
