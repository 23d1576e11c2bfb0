import { describe, expect, it } from 'vitest';

import {
  apparentBrixFromRefractiveIndex,
  apparentBrixFromSpecificGravity,
} from '#shared/physics/apparent-brix.ts';
import { WATER_DENSITY_G_PER_ML } from '#shared/physics/ethanol-water.ts';
import {
  brixFromSugarGPerL,
  densityOfSugarSolution,
  sugarGPerLFromBrix,
} from '#shared/physics/sucrose-water.ts';
import { brixFromRatioByMass, brixFromRatioByVolume, saturatedBrix } from '#shared/physics/syrups.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

describe('ICUMSA density against the CRC table, as read', () => {
  const table = readReferenceTable('crc-sucrose');
  const tolerance = (brix: number) => (brix >= 80 ? 0.55 : brix >= 70 ? 0.35 : table.tolerance);

  it.each(table.rows)('$label', (row) => {
    const brix = row.number('brix');
    const difference = Math.abs(1000 * densityOfSugarSolution(brix / 100) - row.number('density'));
    expect(difference).toBeLessThanOrEqual(tolerance(brix));
  });
});

describe('refractometer fit', () => {
  const oiv = readReferenceTable('oiv-refraction');
  it.each(oiv.rows)('agrees with the OIV table: $label', (row) => {
    const brix = apparentBrixFromRefractiveIndex(row.number('refractive_index'));
    expect(Math.abs(brix - row.number('brix'))).toBeLessThanOrEqual(oiv.tolerance);
  });

  const crc = readReferenceTable('crc-sucrose');
  it.each(crc.rows)('agrees with the CRC table within its printing: $label', (row) => {
    const brix = apparentBrixFromRefractiveIndex(row.number('refractive_index'));
    expect(Math.abs(brix - row.number('brix'))).toBeLessThanOrEqual(0.07);
  });

  const ethanol = readReferenceTable('refractometer-ethanol');
  it.each(ethanol.rows)('reads sugar where there is only alcohol: $label', (row) => {
    const brix = apparentBrixFromRefractiveIndex(row.number('refractive_index'));
    expect(Math.abs(brix - row.number('apparent_brix'))).toBeLessThanOrEqual(ethanol.tolerance);
  });
});

describe('hydrometer fit to NBS Circular 440 against ICUMSA density', () => {
  it.each([5, 10, 20, 30, 40])('%i °Brix', (brix) => {
    const specificGravity = densityOfSugarSolution(brix / 100) / WATER_DENSITY_G_PER_ML;
    expect(Math.abs(apparentBrixFromSpecificGravity(specificGravity) - brix)).toBeLessThanOrEqual(0.02);
  });
});

describe('syrups', () => {
  const table = readReferenceTable('syrups');
  it.each(table.rows)('by mass, evaluated elsewhere: $label', (row) => {
    const brix = brixFromRatioByMass(row.number('ratio'));
    expect(Math.abs(brix - row.number('brix'))).toBeLessThanOrEqual(0.0005);
    expect(Math.abs(1000 * densityOfSugarSolution(brix / 100) - row.number('density'))).toBeLessThanOrEqual(
      table.tolerance,
    );
    expect(Math.abs(sugarGPerLFromBrix(brix) - row.number('sugar_g_per_l'))).toBeLessThanOrEqual(
      table.tolerance,
    );
    expect(
      Math.abs(brixFromSugarGPerL(row.number('sugar_g_per_l')) - row.number('brix')),
    ).toBeLessThanOrEqual(0.005);
  });

  it('1:1 by volume is about 46 °Brix and 555 g/L (bulk density from memory)', () => {
    expect(brixFromRatioByVolume(1)).toBeCloseTo(46, 1);
    expect(sugarGPerLFromBrix(brixFromRatioByVolume(1))).toBeCloseTo(555.6, 0);
  });

  const solubility = readReferenceTable('sucrose-solubility');
  it.each(solubility.rows)('saturation, which feeds the calculation: $label', (row) => {
    expect(saturatedBrix(row.number('temperature_c'))).toBeCloseTo(row.number('mass_percent'), 2);
  });

  it('2:1 is just under saturation at 20 C and over it in a refrigerator', () => {
    expect(brixFromRatioByMass(2)).toBeLessThan(saturatedBrix(20));
    expect(brixFromRatioByMass(2)).toBeGreaterThan(saturatedBrix(5));
  });
});

describe('other sugars counted as sucrose', () => {
  it.each([
    ['crc-glucose', 20, -1.3],
    ['crc-glucose', 40, -4.1],
    ['crc-fructose', 20, 0.6],
    ['crc-fructose', 40, 0.4],
  ])('%s at %i %% differs from sucrose by %f kg/m3, as CRC prints both', (name, massPercent, stated) => {
    const row = readReferenceTable(name).rows.find((each) => each.number('mass_percent') === massPercent)!;
    const difference = 1000 * (row.number('density') - densityOfSugarSolution(massPercent / 100));
    expect(Math.abs(difference - stated)).toBeLessThanOrEqual(0.1);
  });
});

describe('a syrup of 1 kg sugar and 1 kg water', () => {
  it('makes 1626.5 mL, not 2000 (costing example 6)', () => {
    expect(2000 / densityOfSugarSolution(0.5)).toBeCloseTo(1626.5, 1);
  });
});
