import { CsvError, parse } from 'csv-parse/sync';
import Papa from 'papaparse';

import {
  CSV_IMPORT_LIMITS,
  INGREDIENT_CSV_COLUMNS,
  type IngredientCsvColumn,
  type IngredientImportRequest,
  type IngredientWrite,
} from '#shared/contracts/ingredient.ts';

import { problems } from '../../http/problems.ts';
import { csvRow } from './csv-columns.ts';

/**
 * A cell that a spreadsheet would take for a formula gets an apostrophe in front, as does one that already has such
 * an apostrophe: taking one away again gives back exactly what was there.
 */
const LOOKS_LIKE_FORMULA = /^'*[=+\-@\t\r]/;
const ESCAPED_FORMULA = /^'+[=+\-@\t\r]/;

const DELIMITERS = [',', ';', '\t'] as const;

/** The CSV of a back bar, headings first, in UTF-8 with a mark that spreadsheets understand. */
export function writeCsv(rows: readonly IngredientWrite[]): string {
  const data = rows.map((row) =>
    csvRow(row).map((cell) => (LOOKS_LIKE_FORMULA.test(cell) ? `'${cell}` : cell)),
  );
  return `\ufeff${Papa.unparse({ fields: [...INGREDIENT_CSV_COLUMNS], data }, { newline: '\r\n' })}\r\n`;
}

export interface CsvRecord {
  /** First line of the row in the file, from 1. */
  line: number;
  cells: string[];
}

export interface CsvFile {
  headings: string[];
  records: CsvRecord[];
}

/** Reads a file that somebody's spreadsheet wrote: comma, semicolon or tab, quotes, line breaks inside quotes. */
export function readCsv(text: string): CsvFile {
  const rows = parsedRows(text);
  const [headings, ...records] = rows;
  if (headings === undefined || headings.cells.every((cell) => cell.trim() === '')) {
    throw refused('The file is empty. Its first line must name the columns.');
  }
  if (records.length === 0) throw refused('The file has headings but no rows.');
  if (records.length > CSV_IMPORT_LIMITS.maxRows) {
    throw refused(`The file has ${records.length} rows; ${CSV_IMPORT_LIMITS.maxRows} can be read at once.`);
  }
  return { headings: headings.cells.map((cell) => cell.trim()), records };
}

function parsedRows(text: string): CsvRecord[] {
  try {
    const parsed = parse(text, {
      bom: true,
      delimiter: delimiterOf(text),
      relax_column_count: true,
      raw: true,
    }) as unknown as { record: string[]; raw: string }[];
    return withLines(parsed).filter(({ cells }) => cells.some((cell) => cell.trim() !== ''));
  } catch (error) {
    if (error instanceof CsvError) throw refused(`The file cannot be read as CSV: ${error.message}.`);
    throw error;
  }
}

/** The line on which each record begins, by the line breaks before it. */
function withLines(parsed: readonly { record: string[]; raw: string }[]): CsvRecord[] {
  let line = 1;
  return parsed.map(({ record, raw }) => {
    const first = line;
    line += raw.match(/\r\n|\n|\r/g)?.length ?? 0;
    return { line: first, cells: record.map((cell) => (ESCAPED_FORMULA.test(cell) ? cell.slice(1) : cell)) };
  });
}

function refused(detail: string) {
  return problems.invalidField('#/csv', 'csv', detail);
}

/** The delimiter that the first line has most of, outside quotes. */
function delimiterOf(text: string): string {
  const firstLine = /^[^\r\n]*/.exec(text)?.[0].replaceAll(/"[^"]*"/g, '') ?? '';
  const counts = DELIMITERS.map((delimiter) => ({ delimiter, count: firstLine.split(delimiter).length }));
  return counts.reduce((best, next) => (next.count > best.count ? next : best)).delimiter;
}

export type CsvMapping = Partial<Record<IngredientCsvColumn, number>>;

/** A column of ours that more than one heading could mean. */
export interface UnclearHeading {
  column: IngredientCsvColumn;
  headings: string[];
}

/** Which column of the file is which of ours: as asked, or by the headings. What they leave unclear is not guessed. */
export function mappingOf(
  file: CsvFile,
  asked: IngredientImportRequest['mapping'],
): { mapping: CsvMapping; unclear: UnclearHeading[] } {
  if (asked === undefined) return guessedMapping(file.headings);
  for (const [column, index] of Object.entries(asked)) {
    if (index >= file.headings.length) {
      const detail = `${column} is column no. ${index + 1}; the file has ${file.headings.length}.`;
      throw problems.invalidField(`#/mapping/${column}`, 'maximum', detail);
    }
  }
  return { mapping: asked, unclear: [] };
}

function guessedMapping(headings: readonly string[]): { mapping: CsvMapping; unclear: UnclearHeading[] } {
  const mapping: CsvMapping = {};
  const unclear: UnclearHeading[] = [];
  for (const column of INGREDIENT_CSV_COLUMNS) {
    const found = headingsFor(column, headings);
    if (found.length > 1) unclear.push({ column, headings: found.map((index) => headings[index] ?? '') });
    else if (found[0] !== undefined) mapping[column] = found[0];
  }
  return { mapping, unclear };
}

/** Where a column of ours stands in the file: under its own name, or else under another that people give it. */
function headingsFor(column: IngredientCsvColumn, headings: readonly string[]): number[] {
  const plain = (text: string) => text.toLowerCase().replaceAll(/[^a-z]/g, '');
  const where = (names: readonly string[]) =>
    headings.flatMap((heading, index) => (names.includes(plain(heading)) ? [index] : []));
  const own = where([plain(column)]);
  return own.length > 0 ? own : where(OTHER_HEADINGS[column] ?? []);
}

/** Headings that people write for our columns, with nothing but small letters. */
const OTHER_HEADINGS: Partial<Record<IngredientCsvColumn, string[]>> = {
  name: ['ingredient', 'ingredientname', 'product'],
  category: ['type', 'kind'],
  abv_percent: ['abv', 'alcohol', 'strength', 'vol', 'volpercent'],
  sugar_g_per_l: ['sugar', 'sugargl', 'sugarg', 'sugars'],
  citric_g_per_l: ['acid', 'citric', 'acidgl', 'citricacid', 'acidascitric'],
  density_g_per_ml: ['density', 'densitygml'],
  note: ['notes', 'comment', 'remarks'],
};
