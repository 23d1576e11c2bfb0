import { describe, expect, it } from 'vitest';

import { ACIDS, acidAsCitric } from '#shared/physics/acids.ts';
import { ACID_KEYS, type AcidKey } from '#shared/physics/composition.ts';
import { WATER_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import { NO_ACIDS } from '#shared/physics/acids.ts';
import { massGOfContents, volumeMlOfContents } from '#shared/physics/mixing.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

describe('equivalents of acids', () => {
  const table = readReferenceTable('acid-equivalents');

  it('cover every acid told apart', () => {
    expect(table.rows.map((row) => row.text('acid')).sort()).toEqual([...ACID_KEYS].sort());
  });

  it.each(table.rows)('$label', (row) => {
    const acid = ACIDS[row.text('acid') as AcidKey];
    expect(acid.molarMassGPerMol).toBe(row.number('molar_mass'));
    expect(acid.equivalents).toBe(row.number('equivalents'));
    expect(Math.abs(acid.citricFactor - row.number('citric_factor'))).toBeLessThanOrEqual(table.tolerance);
    expect(acidAsCitric({ [row.text('acid')]: 10 })).toBeCloseTo(10 * row.number('citric_factor'), 2);
  });
});

describe('citric acid in water against the CRC table', () => {
  const table = readReferenceTable('crc-citric-acid');
  const drinks = table.rows.filter((row) => row.number('mass_percent') <= 20);

  it.each(drinks)('$label', (row) => {
    const acidG = row.number('mass_percent');
    const contents = {
      ethanolG: 0,
      waterG: 100 - acidG,
      sugarG: 0,
      acidsG: { ...NO_ACIDS, citric: acidG },
      restG: 0,
      residualMl: 0,
    };
    const density = massGOfContents(contents) / volumeMlOfContents(contents);
    expect(Math.abs(density - row.number('density'))).toBeLessThanOrEqual(table.tolerance);
  });

  it('gives the apparent volume that is used: 0.595 to 0.598 mL/g at 5, 10 and 20 % mass', () => {
    for (const row of table.rows.filter((each) => [5, 10, 20].includes(each.number('mass_percent')))) {
      const w = row.number('mass_percent') / 100;
      const apparent = (1 / row.number('density') - (1 - w) / WATER_DENSITY_G_PER_ML) / w;
      expect(Math.abs(apparent - ACIDS.citric.apparentVolumeMlPerG), row.label).toBeLessThanOrEqual(
        ACIDS.citric.apparentVolumeSpreadMlPerG,
      );
    }
  });
});
