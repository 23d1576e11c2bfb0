/**
 * Acids of drinks: what each neutralises compared with citric acid, and the room it takes up.
 *
 * Titratable acid is counted by the equivalent-count rule: every acid by the protons that standard titration
 * (pH 8.2) counts, expressed as the mass of anhydrous citric acid that would neutralise as much. Equal titration is
 * neither equal pH nor equal sourness. Symbols: M molar mass [g/mol], n protons counted, v apparent specific volume
 * of the dissolved acid [mL/g at 20 C]. Sources: acid-constants, crc-concentrative, acid-volumes (docs/sources/acids.md).
 */
import { ACID_KEYS, type AcidKey } from './composition.ts';

/** Mass of anhydrous citric acid in one equivalent [g]: 192.12 / 3. */
export const CITRIC_EQUIVALENT_MASS_G = 64.04;

export interface Acid {
  /** Molar mass of the free acid without water of crystallisation [g/mol]. */
  readonly molarMassGPerMol: number;
  /** Protons counted by titration to pH 8.2. */
  readonly equivalents: number;
  /** Grams of citric acid that neutralise as much as one gram of this acid [g/g]. */
  readonly citricFactor: number;
  /** Volume that one dissolved gram adds to the liquid [mL/g]. */
  readonly apparentVolumeMlPerG: number;
  /** How far off that volume may be [mL/g]. */
  readonly apparentVolumeSpreadMlPerG: number;
  readonly apparentVolumeKnownBy: 'handbook' | 'from memory';
}

function acid(input: {
  molarMassGPerMol: number;
  equivalents: number;
  volume: readonly [mlPerG: number, spread: number, knownBy: Acid['apparentVolumeKnownBy']];
}): Acid {
  const [apparentVolumeMlPerG, apparentVolumeSpreadMlPerG, apparentVolumeKnownBy] = input.volume;
  return {
    molarMassGPerMol: input.molarMassGPerMol,
    equivalents: input.equivalents,
    citricFactor: (input.equivalents * CITRIC_EQUIVALENT_MASS_G) / input.molarMassGPerMol,
    apparentVolumeMlPerG,
    apparentVolumeSpreadMlPerG,
    apparentVolumeKnownBy,
  };
}

/**
 * The acids told apart. Citric: v follows from the CRC densities at 5, 10 and 20 % mass (0.595, 0.597, 0.598). The others are
 * recalled from tables of apparent molar volume: 0.05 mL/g on 6 g/L moves a volume by 0.03 %.
 */
export const ACIDS: Readonly<Record<AcidKey, Acid>> = {
  citric: acid({ molarMassGPerMol: 192.12, equivalents: 3, volume: [0.597, 0.003, 'handbook'] }),
  malic: acid({ molarMassGPerMol: 134.09, equivalents: 2, volume: [0.62, 0.02, 'from memory'] }),
  tartaric: acid({ molarMassGPerMol: 150.09, equivalents: 2, volume: [0.56, 0.02, 'from memory'] }),
  lactic: acid({ molarMassGPerMol: 90.08, equivalents: 1, volume: [0.78, 0.03, 'from memory'] }),
  acetic: acid({ molarMassGPerMol: 60.05, equivalents: 1, volume: [0.86, 0.01, 'from memory'] }),
  phosphoric: acid({ molarMassGPerMol: 97.99, equivalents: 2, volume: [0.48, 0.02, 'from memory'] }),
  succinic: acid({ molarMassGPerMol: 118.09, equivalents: 2, volume: [0.7, 0.02, 'from memory'] }),
  ascorbic: acid({ molarMassGPerMol: 176.12, equivalents: 1, volume: [0.6, 0.03, 'from memory'] }),
};

/** Acids by species, in grams, g/L or any one unit of amount; an acid that is not named is absent. */
export type AcidAmounts = Readonly<Partial<Record<AcidKey, number>>>;

/** No acid at all. */
export const NO_ACIDS: Readonly<Record<AcidKey, number>> = {
  citric: 0,
  malic: 0,
  tartaric: 0,
  lactic: 0,
  acetic: 0,
  phosphoric: 0,
  succinic: 0,
  ascorbic: 0,
};

/** What is added up for every acid, in the order of ACID_KEYS. */
function weights(of: (acid: Acid) => number): readonly number[] {
  return ACID_KEYS.map((key) => of(ACIDS[key]));
}

const CITRIC_FACTORS = weights((each) => each.citricFactor);
const ONES = weights(() => 1);
const APPARENT_VOLUMES = weights((each) => each.apparentVolumeMlPerG);
const MOLES = weights((each) => 1 / each.molarMassGPerMol);

/** A plain loop, since it runs several times for every line of every keystroke; liquids without acid cost nothing. */
function weightedSum(amounts: AcidAmounts, factors: readonly number[]): number {
  if (amounts === NO_ACIDS) return 0;
  let sum = 0;
  for (let index = 0; index < ACID_KEYS.length; index += 1) {
    const amount = amounts[ACID_KEYS[index]!];
    if (amount !== undefined) sum += amount * factors[index]!;
  }
  return sum;
}

/**
 * Titratable acid expressed as citric acid.
 *
 * Formula:   sum of a_i * n_i * 64.04 / M_i
 * @param amounts   acids by species, all in one unit [g or g/L]
 * @returns         citric acid that neutralises as much [the unit given]
 * Range:     any amounts that are not negative
 * Accuracy:  0.1 % of the sum for free acids; phosphoric counts 2 where titration to pH 8.2 finds 1.957
 * Limits:    salts lower what a titration finds (potassium of juices): this is the total, not the titrated acid
 * Source:    equivalent-count rule; molar masses in docs/sources/acids.md
 * @example   acidAsCitric({ citric: 45, malic: 4 }) // 48.82
 */
export function acidAsCitric(amounts: AcidAmounts): number {
  return weightedSum(amounts, CITRIC_FACTORS);
}

/**
 * Mass of all acids together.
 *
 * Formula:   sum of a_i
 * @param amounts   acids by species, all in one unit [g or g/L]
 * @returns         their sum [the unit given]
 * Range:     any amounts that are not negative
 * Accuracy:  exact
 * Limits:    says nothing about strength or taste
 * Source:    mass balance
 * @example   totalAcid({ citric: 40, malic: 20 }) // 60
 */
export function totalAcid(amounts: AcidAmounts): number {
  return weightedSum(amounts, ONES);
}

/**
 * Room that dissolved acids take up.
 *
 * Formula:   sum of m_i * v_i
 * @param acidsG   acids by species [g]
 * @returns        their apparent volume at 20 C [mL]
 * Range:     up to about 200 g/L of acid
 * Accuracy:  0.5 % for citric acid, 2 to 4 % for the others
 * Limits:    the volumes are those of acids in water; with ethanol they are a little smaller
 * Source:    CRC Handbook for citric acid; the others from memory (docs/sources/acids.md)
 * @example   apparentVolumeOfAcidsMl({ citric: 10 }) // 5.97
 */
export function apparentVolumeOfAcidsMl(acidsG: AcidAmounts): number {
  return weightedSum(acidsG, APPARENT_VOLUMES);
}

/**
 * Amount of substance of all acids together.
 *
 * Formula:   sum of m_i / M_i
 * @param acidsG   acids by species [g]
 * @returns        amount of substance [mol]
 * Range:     any masses that are not negative
 * Accuracy:  0.01 %
 * Limits:    counts molecules, not ions
 * Source:    molar masses in docs/sources/acids.md
 * @example   molesOfAcids({ citric: 192.12, acetic: 60.05 }) // 2
 */
export function molesOfAcids(acidsG: AcidAmounts): number {
  return weightedSum(acidsG, MOLES);
}
