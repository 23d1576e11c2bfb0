import { describe, expect, it } from 'vitest';

import { ML_PER_CENTILITRE, ML_PER_FLUID_OUNCE } from '#shared/units/measure-amount.ts';
import { unitFromVolumeMl, volumeMlFromUnit } from '#shared/units/volume-units.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

describe('measures of UCUM and NIST Handbook 44', () => {
  const table = readReferenceTable('measures');
  it.each(table.rows)('$label', (row) => {
    const volumeMl = volumeMlFromUnit({ value: row.number('fluid_ounces'), unit: 'oz' });
    expect(Math.abs(volumeMl - row.number('ml'))).toBeLessThanOrEqual(table.tolerance);
  });
});

describe('exact factors', () => {
  it('make a US gallon 128 fluid ounces of 231 cubic inches, the inch being 2.54 cm', () => {
    expect(128 * volumeMlFromUnit({ value: 1, unit: 'oz' })).toBeCloseTo(231 * 2.54 ** 3, 9);
  });

  it('are the ones that amounts are read with', () => {
    expect(ML_PER_FLUID_OUNCE).toBe(volumeMlFromUnit({ value: 1, unit: 'oz' }));
    expect(ML_PER_CENTILITRE).toBe(volumeMlFromUnit({ value: 1, unit: 'cl' }));
  });

  it('go both ways', () => {
    expect(unitFromVolumeMl({ volumeMl: 29.5735295625, unit: 'oz' })).toBe(1);
    expect(unitFromVolumeMl({ volumeMl: 45, unit: 'cl' })).toBe(4.5);
    expect(unitFromVolumeMl({ volumeMl: 45, unit: 'ml' })).toBe(45);
  });
});
