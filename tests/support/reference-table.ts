import { readFileSync, readdirSync } from 'node:fs';

/** Reads the published tables of `tests/reference/tables`: a CSV file, and beside it where its numbers come from. */

const FOLDER = new URL('../reference/tables/', import.meta.url);

export interface ReferenceSource {
  readonly id: string;
  readonly title: string;
  readonly edition: string;
  readonly table: string;
  readonly page: string;
  readonly link: string;
  readonly licence: string;
  readonly status: string;
  readonly feedsCalculation: boolean;
  readonly columns: Readonly<Record<string, { readonly unit: string; readonly printedDecimals: number }>>;
  readonly tolerance: { readonly value: number; readonly why: string };
  readonly typedBy: string;
  readonly checkedBy: string;
}

/** One row: text as printed, and numbers of it. */
export interface ReferenceRow {
  readonly label: string;
  text(column: string): string;
  number(column: string): number;
  /** Null where the source leaves the cell empty. */
  numberOrNull(column: string): number | null;
}

export interface ReferenceTable {
  readonly source: ReferenceSource;
  readonly tolerance: number;
  readonly rows: readonly ReferenceRow[];
}

export function referenceTableNames(): string[] {
  return readdirSync(FOLDER)
    .filter((file) => file.endsWith('.csv'))
    .map((file) => file.replace(/\.csv$/, ''));
}

export function referenceSourceNames(): string[] {
  return readdirSync(FOLDER)
    .filter((file) => file.endsWith('.source.json'))
    .map((file) => file.replace(/\.source\.json$/, ''));
}

export function columnsOfTable(name: string): string[] {
  return linesOf(name)[0]!.split(',');
}

export function readReferenceSource(name: string): ReferenceSource {
  return JSON.parse(readFileSync(new URL(`${name}.source.json`, FOLDER), 'utf8')) as ReferenceSource;
}

export function readReferenceTable(name: string): ReferenceTable {
  const columns = columnsOfTable(name);
  const source = readReferenceSource(name);
  const rows = linesOf(name)
    .slice(1)
    .map((line) => rowOf(columns, line));
  return { source, tolerance: source.tolerance.value, rows };
}

function linesOf(name: string): string[] {
  return readFileSync(new URL(`${name}.csv`, FOLDER), 'utf8')
    .trim()
    .split('\n');
}

function rowOf(columns: string[], line: string): ReferenceRow {
  const cells = line.split(',');
  const text = (column: string): string => {
    const cell = cells[columns.indexOf(column)];
    if (cell === undefined) throw new Error(`no column ${column} in ${columns.join(', ')}`);
    return cell;
  };
  const numberOrNull = (column: string): number | null => (text(column) === '' ? null : Number(text(column)));
  const number = (column: string): number => {
    const value = numberOrNull(column);
    if (value === null || Number.isNaN(value)) throw new Error(`no number in ${column}: ${line}`);
    return value;
  };
  return { label: line, text, number, numberOrNull };
}

/** Difference of two numbers must not be larger than a tolerance; one ulp of slack, so that a tolerance of 0.01 means 0.01. */
export function isWithin(input: { actual: number; expected: number; tolerance: number }): boolean {
  return Math.abs(input.actual - input.expected) <= input.tolerance + 1e-12 * Math.abs(input.expected);
}
