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
      skip_empty_lines: true,
      info: true,
    }) as unknown as { record: string[]; info: { lines: number } }[];
    return parsed.map(({ record }, index) => ({
      line: (parsed[index - 1]?.info.lines ?? 0) + 1,
      cells: record.map((cell) => (ESCAPED_FORMULA.test(cell) ? cell.slice(1) : cell)),
    }));
  } catch (error) {
    if (error instanceof CsvError) throw refused(`The file cannot be read as CSV: ${error.message}.`);
    throw error;
  }
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

/** Which column of the file is which of ours: as asked, or by the headings. */
export function mappingOf(file: CsvFile, asked: IngredientImportRequest['mapping']): CsvMapping {
  const mapping: CsvMapping = asked ?? guessedMapping(file.headings);
  for (const [column, index] of Object.entries(mapping)) {
    if (index >= file.headings.length) {
      const detail = `${column} is column no. ${index + 1}; the file has ${file.headings.length}.`;
      throw problems.invalidField(`#/mapping/${column}`, 'maximum', detail);
    }
  }
  return mapping;
}

function guessedMapping(headings: readonly string[]): CsvMapping {
  const plain = (text: string) => text.toLowerCase().replaceAll(/[^a-z]/g, '');
  const mapping: CsvMapping = {};
  for (const column of INGREDIENT_CSV_COLUMNS) {
    const names = [plain(column), ...(OTHER_HEADINGS[column] ?? [])];
    const index = headings.findIndex((heading) => names.includes(plain(heading)));
    if (index >= 0) mapping[column] = index;
  }
  return mapping;
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
