import { describe, expect, it } from 'vitest';

import { NO_ACIDS } from '#shared/physics/acids.ts';
import { type Contents, contentsPerMl } from '#shared/physics/contents.ts';
import { massFractionFromVolumeFraction } from '#shared/physics/ethanol-water.ts';
import { freezingPointC } from '#shared/physics/freezing.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

function inWater(masses: { ethanolG?: number; sugarG?: number; citricG?: number }): Contents {
  const { ethanolG = 0, sugarG = 0, citricG = 0 } = masses;
  return {
    ethanolG,
    waterG: 100 - ethanolG - sugarG - citricG,
    sugarG,
    acidsG: { ...NO_ACIDS, citric: citricG },
    restG: 0,
    residualMl: 0,
  };
}

describe('one solute in water, at the rows that feed the calculation', () => {
  const ethanol = readReferenceTable('crc-freezing-ethanol');
  it.each(ethanol.rows)('ethanol: $label', (row) => {
    const freezing = freezingPointC(inWater({ ethanolG: row.number('mass_percent') }))!;
    expect(Math.abs(freezing - row.number('freezing_c'))).toBeLessThanOrEqual(ethanol.tolerance);
  });

  const sucrose = readReferenceTable('crc-freezing-sucrose');
  it.each(sucrose.rows)('sugar: $label', (row) => {
    const freezing = freezingPointC(inWater({ sugarG: row.number('mass_percent') }))!;
    expect(Math.abs(freezing - row.number('freezing_c'))).toBeLessThanOrEqual(sucrose.tolerance);
  });

  const citric = readReferenceTable('crc-citric-acid');
  it.each(citric.rows)('citric acid: $label', (row) => {
    const freezing = freezingPointC(inWater({ citricG: row.number('mass_percent') }))!;
    expect(Math.abs(freezing + row.number('freezing_depression_k'))).toBeLessThanOrEqual(0.005);
  });
});

describe('ethanol and water against second sources', () => {
  const melinder = readReferenceTable('melinder-freezing');
  it.each(melinder.rows)('Melinder agrees with what we follow: $label', (row) => {
    const freezing = freezingPointC(inWater({ ethanolG: row.number('mass_percent') }))!;
    expect(Math.abs(freezing - row.number('freezing_c'))).toBeLessThanOrEqual(melinder.tolerance);
  });

  const lange = readReferenceTable('lange-freezing');
  it.each(lange.rows)('Lange is warmer, by no more than is stated: $label', (row) => {
    const massPercent = row.number('mass_percent');
    const freezing = freezingPointC(inWater({ ethanolG: massPercent }))!;
    const warmerK = row.number('freezing_c') - freezing;
    expect(warmerK).toBeGreaterThan(-0.3);
    expect(warmerK).toBeLessThanOrEqual(massPercent <= 20 ? lange.tolerance : 1.6);
  });

  const toolbox = readReferenceTable('toolbox-freezing');
  it.each(toolbox.rows)('a coarse table is within a kelvin: $label', (row) => {
    const ethanolG = 100 * massFractionFromVolumeFraction(row.number('volume_percent') / 100);
    const freezing = freezingPointC(inWater({ ethanolG }))!;
    expect(Math.abs(freezing - row.number('freezing_c'))).toBeLessThanOrEqual(toolbox.tolerance);
  });
});

describe('drinks with sugar', () => {
  const table = readReferenceTable('freezing-drinks');
  it.each(table.rows)(
    'additive method and the product of water activities, evaluated elsewhere: $label',
    (row) => {
      const freezing = freezingPointC(
        contentsPerMl({
          abvFraction: row.number('volume_percent') / 100,
          sugarGPerL: row.number('sugar_g_per_l'),
          acidsGPerL: {},
          densityGPerMl: null,
        }),
      )!;
      expect(Math.abs(freezing - row.number('freezing_c'))).toBeLessThanOrEqual(0.02);
      expect(Math.abs(freezing - row.number('ross_c'))).toBeLessThanOrEqual(table.tolerance);
      expect(freezing, 'colder than the ideal law').toBeLessThan(row.number('ideal_c'));
    },
  );
});
