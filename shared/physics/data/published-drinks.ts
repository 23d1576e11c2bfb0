/**
 * Drinks whose figures a book prints, as quiet reference points beside a team's own, and the ranges it gives for families of drinks.
 *
 * Everything here is recalled from the book and checked by arithmetic, not read in it: lines and figures agree within 2 % or rounding, which
 * is a consistency check and no proof. The book gives acid as plain grams; lime is split as it does (4 % citric, 2 % malic), every
 * other acid is counted as citric. Source id: arnold-2014 (docs/sources/dilution.md).
 */
import type { AcidsGPerL, Composition } from '../composition.ts';
import type { Method } from '../dilution.ts';

export interface PublishedLine {
  readonly name: string;
  readonly volumeMl: number;
  readonly composition: Composition;
}

/** What the book prints for the finished drink; null where it was not recalled. */
export interface BookFigures {
  readonly volumeMl: number | null;
  readonly abvFraction: number | null;
  readonly sugarGPerL: number | null;
  /** Plain grams of acid per litre [g/L]. */
  readonly acidGPerL: number | null;
}

export interface PublishedDrink {
  readonly key: string;
  readonly name: string;
  readonly method: Method;
  /** How sure the recollection is. */
  readonly confidence: 'high' | 'medium' | 'low';
  readonly lines: readonly PublishedLine[];
  readonly book: BookFigures;
  readonly source: string;
}

const SOURCE = 'Dave Arnold, Liquid Intelligence (W. W. Norton, 2014), recalled';

function line(input: {
  name: string;
  volumeMl: number;
  abvFraction: number;
  sugarGPerL: number;
  acidsGPerL: AcidsGPerL;
}): PublishedLine {
  const { name, volumeMl, ...stated } = input;
  return { name, volumeMl, composition: { ...stated, densityGPerMl: null } };
}

export const PUBLISHED_DRINKS: readonly PublishedDrink[] = [
  {
    key: 'daiquiri',
    name: 'Daiquiri',
    method: 'shake',
    confidence: 'high',
    lines: [
      line({ name: 'white rum', volumeMl: 60, abvFraction: 0.4, sugarGPerL: 0, acidsGPerL: {} }),
      line({
        name: 'lime juice',
        volumeMl: 22.5,
        abvFraction: 0,
        sugarGPerL: 16,
        acidsGPerL: { citric: 40, malic: 20 },
      }),
      line({ name: 'simple syrup', volumeMl: 22.5, abvFraction: 0, sugarGPerL: 615, acidsGPerL: {} }),
    ],
    book: { volumeMl: 159, abvFraction: 0.15, sugarGPerL: 89, acidGPerL: 8.5 },
    source: SOURCE,
  },
  {
    key: 'whiskey-sour',
    name: 'Whiskey sour',
    method: 'shake',
    confidence: 'medium',
    lines: [
      line({ name: 'whiskey', volumeMl: 60, abvFraction: 0.5, sugarGPerL: 0, acidsGPerL: {} }),
      line({
        name: 'lemon juice',
        volumeMl: 17.5,
        abvFraction: 0,
        sugarGPerL: 16,
        acidsGPerL: { citric: 60 },
      }),
      line({ name: 'simple syrup', volumeMl: 22.5, abvFraction: 0, sugarGPerL: 615, acidsGPerL: {} }),
    ],
    book: { volumeMl: null, abvFraction: null, sugarGPerL: null, acidGPerL: 6.6 },
    source: SOURCE,
  },
  {
    key: 'whiskey-sour-with-egg-white',
    name: 'Whiskey sour with egg white',
    method: 'shake',
    confidence: 'medium',
    lines: [
      line({ name: 'whiskey', volumeMl: 60, abvFraction: 0.5, sugarGPerL: 0, acidsGPerL: {} }),
      line({
        name: 'lemon juice',
        volumeMl: 17.5,
        abvFraction: 0,
        sugarGPerL: 16,
        acidsGPerL: { citric: 60 },
      }),
      line({ name: 'simple syrup', volumeMl: 22.5, abvFraction: 0, sugarGPerL: 615, acidsGPerL: {} }),
      line({ name: 'egg white', volumeMl: 30, abvFraction: 0, sugarGPerL: 0, acidsGPerL: {} }),
    ],
    book: { volumeMl: 197, abvFraction: 0.15, sugarGPerL: 71, acidGPerL: null },
    source: SOURCE,
  },
  {
    key: 'margarita',
    name: 'Margarita',
    method: 'shake',
    confidence: 'high',
    lines: [
      line({ name: 'tequila', volumeMl: 60, abvFraction: 0.4, sugarGPerL: 0, acidsGPerL: {} }),
      line({ name: 'triple sec', volumeMl: 22.5, abvFraction: 0.4, sugarGPerL: 250, acidsGPerL: {} }),
      line({
        name: 'lime juice',
        volumeMl: 22.5,
        abvFraction: 0,
        sugarGPerL: 16,
        acidsGPerL: { citric: 40, malic: 20 },
      }),
      line({ name: 'simple syrup', volumeMl: 7.5, abvFraction: 0, sugarGPerL: 615, acidsGPerL: {} }),
    ],
    book: { volumeMl: 178, abvFraction: 0.185, sugarGPerL: 60, acidGPerL: 7.6 },
    source: SOURCE,
  },
  {
    key: 'hemingway-daiquiri',
    name: 'Hemingway daiquiri',
    method: 'shake',
    confidence: 'high',
    lines: [
      line({ name: 'white rum', volumeMl: 60, abvFraction: 0.4, sugarGPerL: 0, acidsGPerL: {} }),
      line({
        name: 'lime juice',
        volumeMl: 22.5,
        abvFraction: 0,
        sugarGPerL: 16,
        acidsGPerL: { citric: 40, malic: 20 },
      }),
      line({
        name: 'grapefruit juice',
        volumeMl: 15,
        abvFraction: 0,
        sugarGPerL: 104,
        acidsGPerL: { citric: 24 },
      }),
      line({ name: 'maraschino', volumeMl: 15, abvFraction: 0.32, sugarGPerL: 350, acidsGPerL: {} }),
    ],
    book: { volumeMl: 174, abvFraction: 0.165, sugarGPerL: 42, acidGPerL: 9.8 },
    source: SOURCE,
  },
  {
    key: 'manhattan',
    name: 'Manhattan',
    method: 'stir',
    confidence: 'medium',
    lines: [
      line({ name: 'rye', volumeMl: 60, abvFraction: 0.5, sugarGPerL: 0, acidsGPerL: {} }),
      line({
        name: 'sweet vermouth',
        volumeMl: 26.6,
        abvFraction: 0.165,
        sugarGPerL: 160,
        acidsGPerL: { citric: 6 },
      }),
      line({ name: 'bitters', volumeMl: 1.6, abvFraction: 0.45, sugarGPerL: 40, acidsGPerL: {} }),
    ],
    book: { volumeMl: 129, abvFraction: 0.27, sugarGPerL: 34, acidGPerL: 1.2 },
    source: SOURCE,
  },
  {
    key: 'negroni',
    name: 'Negroni',
    method: 'stir',
    confidence: 'medium',
    lines: [
      line({ name: 'gin', volumeMl: 30, abvFraction: 0.473, sugarGPerL: 0, acidsGPerL: {} }),
      line({ name: 'bitter liqueur', volumeMl: 30, abvFraction: 0.24, sugarGPerL: 240, acidsGPerL: {} }),
      line({
        name: 'sweet vermouth',
        volumeMl: 30,
        abvFraction: 0.165,
        sugarGPerL: 160,
        acidsGPerL: { citric: 6 },
      }),
    ],
    book: { volumeMl: 127, abvFraction: 0.207, sugarGPerL: 94, acidGPerL: 1.4 },
    source: SOURCE,
  },
  {
    key: 'old-fashioned',
    name: 'Old-fashioned',
    method: 'build',
    confidence: 'low',
    lines: [
      line({ name: 'bourbon', volumeMl: 60, abvFraction: 0.47, sugarGPerL: 0, acidsGPerL: {} }),
      line({ name: 'simple syrup', volumeMl: 11, abvFraction: 0, sugarGPerL: 615, acidsGPerL: {} }),
      line({ name: 'bitters', volumeMl: 1.6, abvFraction: 0.45, sugarGPerL: 40, acidsGPerL: {} }),
    ],
    book: { volumeMl: 90, abvFraction: 0.32, sugarGPerL: 76, acidGPerL: 0 },
    source: SOURCE,
  },
];

interface Range {
  readonly min: number;
  readonly max: number;
}

/** What the book gives for a family of drinks. */
export interface StructureRange {
  readonly family: string;
  readonly undilutedMl: Range;
  readonly undilutedAbvFraction: Range | null;
  readonly dilutionFraction: Range;
  readonly finalMl: Range;
  readonly abvFraction: Range;
  readonly sugarGPerL: Range;
  readonly acidGPerL: Range;
  readonly confidence: 'low';
}

/** Recalled from pp. 125-126: low confidence, to be checked against the book before anybody relies on them. */
export const STRUCTURE_RANGES: readonly StructureRange[] = [
  {
    family: 'stirred',
    undilutedMl: { min: 90, max: 97 },
    undilutedAbvFraction: { min: 0.29, max: 0.43 },
    dilutionFraction: { min: 0.41, max: 0.49 },
    finalMl: { min: 130, max: 142 },
    abvFraction: { min: 0.21, max: 0.29 },
    sugarGPerL: { min: 37, max: 56 },
    acidGPerL: { min: 1, max: 1.4 },
    confidence: 'low',
  },
  {
    family: 'shaken',
    undilutedMl: { min: 98, max: 112 },
    undilutedAbvFraction: { min: 0.23, max: 0.315 },
    dilutionFraction: { min: 0.51, max: 0.6 },
    finalMl: { min: 156, max: 178 },
    abvFraction: { min: 0.15, max: 0.197 },
    sugarGPerL: { min: 50, max: 89 },
    acidGPerL: { min: 7.6, max: 9.4 },
    confidence: 'low',
  },
  {
    family: 'shaken with egg white',
    undilutedMl: { min: 130, max: 143 },
    undilutedAbvFraction: { min: 0.18, max: 0.23 },
    dilutionFraction: { min: 0.46, max: 0.49 },
    finalMl: { min: 198, max: 209 },
    abvFraction: { min: 0.121, max: 0.152 },
    sugarGPerL: { min: 67, max: 90 },
    acidGPerL: { min: 4.9, max: 6.8 },
    confidence: 'low',
  },
  {
    family: 'blended',
    undilutedMl: { min: 82.5, max: 82.5 },
    undilutedAbvFraction: null,
    dilutionFraction: { min: 0.9, max: 0.9 },
    finalMl: { min: 157.5, max: 157.5 },
    abvFraction: { min: 0.15, max: 0.172 },
    sugarGPerL: { min: 79, max: 81 },
    acidGPerL: { min: 5.7, max: 5.7 },
    confidence: 'low',
  },
  {
    family: 'carbonated',
    undilutedMl: { min: 150, max: 150 },
    undilutedAbvFraction: null,
    dilutionFraction: { min: 0, max: 0 },
    finalMl: { min: 150, max: 150 },
    abvFraction: { min: 0.14, max: 0.16 },
    sugarGPerL: { min: 50, max: 75 },
    acidGPerL: { min: 3.8, max: 5.1 },
    confidence: 'low',
  },
  {
    family: 'built',
    undilutedMl: { min: 70, max: 75 },
    undilutedAbvFraction: null,
    dilutionFraction: { min: 0.24, max: 0.24 },
    finalMl: { min: 88, max: 93 },
    abvFraction: { min: 0.27, max: 0.32 },
    sugarGPerL: { min: 76, max: 76 },
    acidGPerL: { min: 0, max: 0 },
    confidence: 'low',
  },
];
