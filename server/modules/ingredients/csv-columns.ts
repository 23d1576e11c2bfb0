import {
  ALLERGENS,
  INGREDIENT_CATEGORIES,
  INGREDIENT_CSV_COLUMNS,
  type IngredientCsvColumn,
  type IngredientWrite,
  KNOWN_BY,
  type KnownBy,
  type Pack,
} from '#shared/contracts/ingredient.ts';
import { ACID_KEYS, COMPOSITION_RANGES } from '#shared/physics/composition.ts';
import { parseNumber } from '#shared/text/parse-number.ts';

/** A cell that cannot be read: the reason, in a sentence. */
export class CellError extends Error {}

type Reader = (text: string) => unknown;

/** Percent of fractions with as many digits as they have: 0.07 is 7 and not 7.000000000000001. */
function percentText(fraction: number): string {
  return String(Number((fraction * 100).toPrecision(15)));
}

function packsText(packs: readonly Pack[]): string {
  return packs
    .map(({ size, sizeUnit, price, pricedOn }) => `${size} ${sizeUnit}|${price ?? ''}|${pricedOn ?? ''}`)
    .join('; ');
}

/** The row of an ingredient, in the order of the columns. */
export function csvRow(write: IngredientWrite): string[] {
  const { composition, knowledge, allergens } = write;
  const cells: Record<IngredientCsvColumn, string> = {
    name: write.name,
    category: write.category,
    abv_percent: percentText(composition.abvFraction),
    sugar_g_per_l: String(composition.sugarGPerL),
    ...(Object.fromEntries(
      ACID_KEYS.map((acid) => [`${acid}_g_per_l`, String(composition.acidsGPerL[acid] ?? 0)]),
    ) as Record<`${(typeof ACID_KEYS)[number]}_g_per_l`, string>),
    density_g_per_ml: composition.densityGPerMl === null ? '' : String(composition.densityGPerMl),
    abv_known_by: knowledge.abv.how,
    abv_spread_percent: percentText(knowledge.abv.spread),
    sugar_known_by: knowledge.sugar.how,
    sugar_spread_percent: percentText(knowledge.sugar.spread),
    acid_known_by: knowledge.acid.how,
    acid_spread_percent: percentText(knowledge.acid.spread),
    piece_mass_g: write.pieceMassG === null ? '' : String(write.pieceMassG),
    allergens_reviewed: allergens.reviewed ? 'yes' : 'no',
    allergens_contains: allergens.contains.join('; '),
    allergens_may_contain: allergens.mayContain.join('; '),
    packs: packsText(write.packs),
    source: write.source,
    note: write.note,
  };
  return INGREDIENT_CSV_COLUMNS.map((column) => cells[column]);
}

interface Limits {
  min: number;
  max: number;
}

function numberBetween(limits: Limits, whenEmpty: number | null): Reader {
  return (text) => (text === '' ? whenEmpty : numberIn(text, limits));
}

/** What spreadsheets write for very small and very large numbers. */
const WITH_EXPONENT = /^[+-]?\d+(?:[.,]\d+)?e[+-]?\d{1,3}$/i;

function numberIn(text: string, limits: Limits): number {
  if (WITH_EXPONENT.test(text)) return withinLimits(Number(text.replace(',', '.')), limits);
  const parsed = parseNumber(text, limits);
  if (parsed.ok) return parsed.value;
  const only = parsed.reason === 'ambiguous' ? onlySense(text, limits) : null;
  if (only !== null) return only;
  throw new CellError(parsed.detail);
}

function withinLimits(value: number, { min, max }: Limits): number {
  if (value < min) throw new CellError(`${value} is too low: at least ${min}.`);
  if (value > max) throw new CellError(`${value} is too high: at most ${max}.`);
  return value;
}

/** `1,034` as a density can only be a decimal comma, since 1034 would be nonsense; null where both make sense. */
function onlySense(text: string, limits: Limits): number | null {
  const readings = ['.', ''].map((sign) => parseNumber(text.replace(',', sign), limits));
  const [first, second] = readings.flatMap((reading) => (reading.ok ? [reading.value] : []));
  return second === undefined ? (first ?? null) : null;
}

function percent(whenEmpty: number): Reader {
  const read = numberBetween({ min: 0, max: 100 }, whenEmpty);
  return (text) => Number(((read(text) as number) / 100).toPrecision(15));
}

function wordOf<W extends string>(words: readonly W[], whenEmpty: W | null): Reader {
  return (text) => {
    const word = words.find((candidate) => candidate === text.toLowerCase());
    if (word !== undefined) return word;
    if (text === '' && whenEmpty !== null) return whenEmpty;
    throw new CellError(`allowed are ${words.join(', ')}`);
  };
}

function listOfAllergens(text: string): unknown {
  if (text === '') return [];
  const read = wordOf(ALLERGENS, null);
  return [...new Set(text.split(/[;,]/).map((part) => read(part.trim())))];
}

function readPack(text: string): Pack {
  const [sizeText = '', price = '', pricedOn = ''] = text.split('|').map((part) => part.trim());
  const match = /^([\d.,]+)\s*(ml|g|piece)$/.exec(sizeText);
  if (match === null)
    throw new CellError('a pack is written 700 ml|21.00|2026-11-01, several with ; between');
  return {
    size: Number(match[1]?.replace(',', '.')),
    sizeUnit: match[2] as Pack['sizeUnit'],
    price: price === '' ? null : price.replace(',', '.'),
    pricedOn: pricedOn === '' ? null : pricedOn,
  };
}

const KNOWN_BY_DEFAULT: KnownBy = 'estimate';
const gPerL = numberBetween(COMPOSITION_RANGES.acidGPerL, 0);

/** How the cell of each column is read; an empty cell means what the reader says. */
const READERS: Readonly<Record<IngredientCsvColumn, Reader>> = {
  name: (text) => {
    if (text === '') throw new CellError('a name is needed');
    return text;
  },
  category: wordOf(INGREDIENT_CATEGORIES, 'other'),
  abv_percent: percent(0),
  sugar_g_per_l: numberBetween(COMPOSITION_RANGES.sugarGPerL, 0),
  ...(Object.fromEntries(ACID_KEYS.map((acid) => [`${acid}_g_per_l`, gPerL])) as Record<
    `${(typeof ACID_KEYS)[number]}_g_per_l`,
    Reader
  >),
  density_g_per_ml: numberBetween(COMPOSITION_RANGES.densityGPerMl, null),
  abv_known_by: wordOf(KNOWN_BY, KNOWN_BY_DEFAULT),
  abv_spread_percent: percent(0),
  sugar_known_by: wordOf(KNOWN_BY, KNOWN_BY_DEFAULT),
  sugar_spread_percent: percent(0),
  acid_known_by: wordOf(KNOWN_BY, KNOWN_BY_DEFAULT),
  acid_spread_percent: percent(0),
  piece_mass_g: numberBetween({ min: 0.001, max: 10_000 }, null),
  allergens_reviewed: (text) => wordOf(['yes', 'no'], 'no')(text) === 'yes',
  allergens_contains: listOfAllergens,
  allergens_may_contain: listOfAllergens,
  packs: (text) => (text === '' ? [] : text.split(';').map((part) => readPack(part.trim()))),
  source: (text) => text,
  note: (text) => text,
};

export interface CellProblem {
  column: IngredientCsvColumn;
  value: string;
  detail: string;
}

/** Reads a row, with every cell that cannot be read. */
export function readCsvRow(
  cellOf: (column: IngredientCsvColumn) => string,
): { ok: true; write: IngredientWrite } | { ok: false; problems: CellProblem[] } {
  const problems: CellProblem[] = [];
  const values: Partial<Record<IngredientCsvColumn, unknown>> = {};
  for (const column of INGREDIENT_CSV_COLUMNS) {
    const value = cellOf(column).trim();
    try {
      values[column] = READERS[column](value);
    } catch (error) {
      if (!(error instanceof CellError)) throw error;
      problems.push({ column, value: value.slice(0, 100), detail: error.message });
    }
  }
  return problems.length > 0 ? { ok: false, problems } : { ok: true, write: assemble(values) };
}

/** The parts of a row whose cells were all read; checked against the contract by the caller. */
function assemble(values: Partial<Record<IngredientCsvColumn, unknown>>): IngredientWrite {
  const acids = ACID_KEYS.map((acid) => [acid, values[`${acid}_g_per_l`] as number] as const);
  const known = (part: 'abv' | 'sugar' | 'acid') => ({
    how: values[`${part}_known_by`] as KnownBy,
    spread: values[`${part}_spread_percent`] as number,
  });
  return {
    name: values.name,
    category: values.category,
    composition: {
      abvFraction: values.abv_percent,
      sugarGPerL: values.sugar_g_per_l,
      acidsGPerL: Object.fromEntries(acids.filter(([, value]) => value > 0)),
      densityGPerMl: values.density_g_per_ml,
    },
    knowledge: { abv: known('abv'), sugar: known('sugar'), acid: known('acid') },
    pieceMassG: values.piece_mass_g,
    allergens: {
      reviewed: values.allergens_reviewed,
      contains: values.allergens_contains,
      mayContain: values.allergens_may_contain,
    },
    source: values.source,
    note: values.note,
    packs: values.packs,
  } as IngredientWrite;
}
