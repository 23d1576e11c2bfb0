import { describe, expect, it } from 'vitest';

import {
  densityFromVolumeFraction,
  densityOfEthanolWater,
  massFractionFromDensity,
  massFractionFromVolumeFraction,
  volumeFractionFromMassFraction,
} from '#shared/physics/ethanol-water.ts';
import { type ReferenceRow, readReferenceTable } from '#tests/support/reference-table.ts';

const percent = (fraction: number) => 100 * fraction;
const kgPerM3 = (gPerMl: number) => 1000 * gPerMl;

function massFractionGiven(row: ReferenceRow): number {
  const value = row.number('value');
  switch (row.text('given')) {
    case 'mass_percent':
      return value / 100;
    case 'vol_percent':
      return massFractionFromVolumeFraction(value / 100);
    case 'density_kg_m3':
      return massFractionFromDensity(value / 1000);
    default:
      throw new Error(`unknown quantity ${row.text('given')}`);
  }
}

function quantityWanted(row: ReferenceRow): number {
  const ethanolMassFraction = massFractionGiven(row);
  switch (row.text('wanted')) {
    case 'density_kg_m3':
      return kgPerM3(
        densityOfEthanolWater({ ethanolMassFraction, temperatureC: row.number('temperature_c') }),
      );
    case 'vol_percent':
      return percent(volumeFractionFromMassFraction(ethanolMassFraction));
    case 'mass_percent':
      return percent(ethanolMassFraction);
    default:
      throw new Error(`unknown quantity ${row.text('wanted')}`);
  }
}

describe('OIML R 22 tables, as read', () => {
  const table = readReferenceTable('oiml-r22');

  it('has the 49 rows that were read', () => {
    expect(table.rows).toHaveLength(49);
  });

  it.each(table.rows)('$label', (row) => {
    expect(Math.abs(quantityWanted(row) - row.number('expected'))).toBeLessThanOrEqual(table.tolerance);
  });
});

describe('OIML R 22 grid, evaluated elsewhere (a check of our typing)', () => {
  const table = readReferenceTable('oiml-r22-grid');
  const columns = [
    ['density_minus_5', -5],
    ['density_0', 0],
    ['density_10', 10],
    ['density_15', 15],
    ['density_20', 20],
    ['density_25', 25],
  ] as const;

  it.each(table.rows)('$label', (row) => {
    const q = row.number('volume_percent') / 100;
    const ethanolMassFraction = massFractionFromVolumeFraction(q);
    expect(Math.abs(percent(ethanolMassFraction) - row.number('mass_percent'))).toBeLessThan(0.0006);
    expect(Math.abs(kgPerM3(densityFromVolumeFraction(q)) - row.number('density_20'))).toBeLessThan(0.0006);
    for (const [column, temperatureC] of columns) {
      const density = kgPerM3(densityOfEthanolWater({ ethanolMassFraction, temperatureC }));
      expect(Math.abs(density - row.number(column)), column).toBeLessThanOrEqual(table.tolerance);
    }
  });
});

describe('misprints of OIML R 22 in circulation', () => {
  it('are told by two densities that the wrong coefficients miss', () => {
    expect(kgPerM3(densityOfEthanolWater({ ethanolMassFraction: 1, temperatureC: 0 }))).toBeCloseTo(
      806.22,
      1,
    );
    expect(kgPerM3(densityOfEthanolWater({ ethanolMassFraction: 0.3, temperatureC: -20 }))).toBeCloseTo(
      974.91,
      2,
    );
  });
});
