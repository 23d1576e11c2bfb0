/**
 * Freezing point of a drink: the depressions that ethanol, sugar and acid would cause alone in all of the water, added.
 *
 * n mol of solute per kg of water [mol/kg]; D depression of the freezing point [K], interpolated in n between the rows of the
 * binary tables. Exact with one solute; with several it equals the product of water activities within 0.06 K for
 * drinks. Acids are counted by their moles on the citric acid table. Sources: crc-concentrative (docs/sources/freezing.md).
 */
import { ACIDS, molesOfAcids } from './acids.ts';
import type { Contents } from './contents.ts';
import {
  CITRIC_ACID_FREEZING,
  ETHANOL_FREEZING,
  type FreezingRow,
  SUCROSE_FREEZING,
} from './data/freezing-tables.ts';

const ETHANOL_MOLAR_MASS_G_PER_MOL = 46.068;
const SUCROSE_MOLAR_MASS_G_PER_MOL = 342.3;
const G_PER_KG = 1000;

/** Knots of one table: mol per kg of water and depression [K], rising. */
type Curve = readonly (readonly [molPerKg: number, depressionK: number])[];

function curveOf(rows: readonly FreezingRow[], molarMassGPerMol: number): Curve {
  const knots = rows.map(([massPercent, depressionK]): readonly [number, number] => [
    (G_PER_KG * massPercent) / (molarMassGPerMol * (100 - massPercent)),
    depressionK,
  ]);
  return [[0, 0], ...knots];
}

const CURVES = {
  ethanol: curveOf(ETHANOL_FREEZING, ETHANOL_MOLAR_MASS_G_PER_MOL),
  sugar: curveOf(SUCROSE_FREEZING, SUCROSE_MOLAR_MASS_G_PER_MOL),
  acid: curveOf(CITRIC_ACID_FREEZING, ACIDS.citric.molarMassGPerMol),
} as const;

/** Depression at a molality, or null beyond the last row. */
function depressionK(curve: Curve, molPerKg: number): number | null {
  let before = curve[0]!;
  for (const knot of curve) {
    if (knot[0] >= molPerKg) {
      if (knot[0] === before[0]) return knot[1];
      return before[1] + ((knot[1] - before[1]) * (molPerKg - before[0])) / (knot[0] - before[0]);
    }
    before = knot;
  }
  return null;
}

/**
 * Freezing point of a drink.
 *
 * Formula:   T_f = -[D_e(n_e) + D_s(n_s) + D_a(n_a)]
 * @param contents   what is in the liquid
 * @returns          temperature at which the first ice forms [C]; null beyond the tables or without water
 * Range:     in the water alone: ethanol to 68 % mass, sugar to 42 %, acid to 30 %
 * Accuracy:  0.01 K with one solute at the rows; about ±0.3 K for drinks under 20 % vol
 * Limits:    sugars are counted as sucrose: invert sugar lowers it 1.8 to 1.9 times more per gram; rest is not counted; the sum
 *            of depressions is from memory as a method, no measurement of such a mix was found
 * Source:    CRC Handbook of Chemistry and Physics, 102nd ed. (2021), Concentrative properties of aqueous solutions
 * @example   freezingPointC({ ethanolG: 10, waterG: 90, sugarG: 0, acidsG: NO_ACIDS, restG: 0, residualMl: 0 }) // -4.47
 */
export function freezingPointC(contents: Contents): number | null {
  if (!(contents.waterG > 0)) return null;
  const waterKg = contents.waterG / G_PER_KG;
  const byEthanol = depressionK(CURVES.ethanol, contents.ethanolG / ETHANOL_MOLAR_MASS_G_PER_MOL / waterKg);
  const bySugar = depressionK(CURVES.sugar, contents.sugarG / SUCROSE_MOLAR_MASS_G_PER_MOL / waterKg);
  const byAcid = depressionK(CURVES.acid, molesOfAcids(contents.acidsG) / waterKg);
  if (byEthanol === null || bySugar === null || byAcid === null) return null;
  return 0 - (byEthanol + bySugar + byAcid);
}
