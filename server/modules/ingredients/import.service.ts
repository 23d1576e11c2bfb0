import { randomUUID } from 'node:crypto';

import {
  INGREDIENT_CSV_COLUMNS,
  type IngredientCsvColumn,
  type IngredientImportPreview,
  type IngredientImportRequest,
  type IngredientImportResult,
  type IngredientWrite,
  IngredientWriteSchema,
} from '#shared/contracts/ingredient.ts';
import type { FieldError } from '#shared/contracts/problem.ts';

import { canonicalJson } from '../../db/canonical-json.ts';
import { ProblemError, problems } from '../../http/problems.ts';
import { compileBodyCheck } from '../../http/validation.ts';
import type { ActingContext } from '../../http/route.ts';
import { recordEvent } from '../teams/index.ts';
import { csvRow, readCsvRow } from './csv-columns.ts';
import {
  type CsvMapping,
  type CsvRecord,
  type UnclearHeading,
  mappingOf,
  readCsv,
  writeCsv,
} from './csv-file.ts';
import { Ingredient } from './ingredient.entity.ts';
import { columnsOf, toIngredientWrite } from './ingredient.mapper.ts';
import { findBackBar } from './ingredient.queries.ts';
import { changeBackBar, nonsenseIn } from './ingredient.service.ts';

type PreviewRow = IngredientImportPreview['rows'][number];
type ImportError = IngredientImportPreview['errors'][number];

const checkWrite = compileBodyCheck(IngredientWriteSchema);

/** The back bar in use as CSV. */
export async function exportIngredients({ em, teamId }: ActingContext): Promise<string> {
  return writeCsv((await findBackBar(em, teamId)).map(toIngredientWrite));
}

/** What an import would do, row by row. Nothing is written. */
export async function previewImport(
  { em, teamId }: ActingContext,
  request: IngredientImportRequest,
): Promise<IngredientImportPreview> {
  return planImport(await findBackBar(em, teamId), request).preview;
}

/** Does what the preview showed, in one transaction: rows without errors are written, the others are not. */
export function applyImport(
  context: ActingContext,
  request: IngredientImportRequest,
): Promise<IngredientImportResult> {
  return changeBackBar(context, async (inside) => {
    const { em, teamId } = inside;
    const plan = planImport(await findBackBar(em, teamId), request);
    const { create, update, unchanged } = plan.preview.counts;
    if (create + update + unchanged === 0) {
      throw problems.invalidField('#/csv', 'nothing-to-import', 'No row of the file can be taken as it is.');
    }
    writePlan(inside, plan);
    if (create + update > 0) recordImport(inside, { create, update });
    await em.flush();
    return { created: create, updated: update, unchanged };
  });
}

function writePlan({ em, teamId }: ActingContext, { preview, existing }: ImportPlan): void {
  for (const { action, name, ingredient } of preview.rows) {
    if (ingredient === null) continue;
    if (action === 'create') {
      em.create(Ingredient, { id: randomUUID(), team: teamId, ...columnsOf(ingredient) });
    }
    const known = existing.get(name.toLowerCase());
    if (action === 'update' && known) {
      em.assign(known, columnsOf(ingredient), { mergeObjectProperties: false });
    }
  }
}

function recordImport(
  { em, teamId, person }: ActingContext,
  { create, update }: { create: number; update: number },
): void {
  const summary = `Imported ingredients from CSV: ${create} added, ${update} changed`;
  const subject = { subjectType: 'team', subjectId: teamId };
  recordEvent(em, { teamId, person, action: 'ingredient.imported', ...subject, summary });
}

interface ImportPlan {
  preview: IngredientImportPreview;
  /** The back bar by lower-cased name. */
  existing: ReadonlyMap<string, Ingredient>;
}

function planImport(backBar: readonly Ingredient[], request: IngredientImportRequest): ImportPlan {
  const file = readCsv(request.csv);
  const { mapping, unclear } = mappingOf(file, request.mapping);
  if (mapping.name === undefined) {
    throw problems.invalidField('#/mapping/name', 'required', 'Say which column of the file holds the name.');
  }
  const existing = new Map(backBar.map((ingredient) => [ingredient.name.toLowerCase(), ingredient]));
  const seen = new Map<string, number>();
  const errors = unclear.map(unclearHeading);
  const width = file.headings.length;
  const rows = file.records.map((record) => planRow({ record, width, mapping, existing, seen, errors }));
  const count = (action: PreviewRow['action']) => rows.filter((row) => row.action === action).length;
  const counts = {
    create: count('create'),
    update: count('update'),
    unchanged: count('unchanged'),
    refuse: count('refuse'),
  };
  return { preview: { headings: file.headings, mapping, rows, errors, counts }, existing };
}

function unclearHeading({ column, headings }: UnclearHeading): ImportError {
  const detail = `${headings.length} columns could be ${column}; choose one, or none is taken`;
  return { row: 1, column, value: headings.join(', ').slice(0, 100), detail };
}

function planRow(input: {
  record: CsvRecord;
  /** How many columns the headings name. */
  width: number;
  mapping: CsvMapping;
  existing: ReadonlyMap<string, Ingredient>;
  seen: Map<string, number>;
  errors: ImportError[];
}): PreviewRow {
  const { record, width, mapping, existing, seen, errors } = input;
  const cell = (column: IngredientCsvColumn) => {
    const index = mapping[column];
    return index === undefined ? undefined : record.cells[index];
  };
  const name = (cell('name') ?? '').trim();
  const key = name.toLowerCase();
  const known = existing.get(key);
  const present = known ? csvRow(toIngredientWrite(known)) : null;
  const result = readCsvRow(
    (column) => cell(column) ?? present?.[INGREDIENT_CSV_COLUMNS.indexOf(column)] ?? '',
  );

  const found = surplusCells(record, width) ?? (result.ok ? problemsOf(result.write, cell) : result.problems);
  const earlier = seen.get(key);
  if (name !== '' && earlier !== undefined) {
    found.push({ column: 'name', value: name, detail: `line ${earlier} already has this name` });
  }
  if (name !== '' && earlier === undefined) seen.set(key, record.line);
  errors.push(...found.map((problem) => ({ row: record.line, ...problem })));

  if (!result.ok || found.length > 0) return { row: record.line, action: 'refuse', name, ingredient: null };
  const ingredient = result.write;
  const action = known === undefined ? 'create' : isSame(known, ingredient) ? 'unchanged' : 'update';
  return { row: record.line, action, name, ingredient };
}

function isSame(known: Ingredient, write: IngredientWrite): boolean {
  return canonicalJson(toIngredientWrite(known)) === canonicalJson(write);
}

type RowProblem = Omit<ImportError, 'row'>;

/** What the contract and the physics say against a row, at the column each is about. */
function problemsOf(
  write: IngredientWrite,
  cell: (column: IngredientCsvColumn) => string | undefined,
): RowProblem[] {
  return [...contractErrors(write), ...nonsenseIn(write)].map(({ pointer, detail }) => {
    const column = columnOfPointer(pointer);
    return { column, value: column === null ? '' : (cell(column) ?? '').slice(0, 100), detail };
  });
}

/** A row with more cells than headings: a separator too many has shifted its values into the wrong columns. */
function surplusCells({ cells }: CsvRecord, width: number): RowProblem[] | null {
  const surplus = cells.slice(width).filter((cell) => cell.trim() !== '');
  if (surplus.length === 0) return null;
  const detail = `the row has ${cells.length} cells and the file ${width} headings; put text with a separator in quotes`;
  return [{ column: null, value: surplus.join(', ').slice(0, 100), detail }];
}

function contractErrors(write: IngredientWrite): FieldError[] {
  try {
    checkWrite(write);
    return [];
  } catch (error) {
    if (error instanceof ProblemError) return error.extra.errors ?? [];
    throw error;
  }
}

function columnOfPointer(pointer: string): IngredientCsvColumn | null {
  const parts = pointer.split('/').slice(1);
  const last = parts.at(-1) ?? '';
  const byMember: Record<string, IngredientCsvColumn> = {
    abvFraction: 'abv_percent',
    sugarGPerL: 'sugar_g_per_l',
    densityGPerMl: 'density_g_per_ml',
    pieceMassG: 'piece_mass_g',
  };
  const first = parts[0] ?? '';
  const named = INGREDIENT_CSV_COLUMNS.find((column) => column === first || column === `${last}_g_per_l`);
  if (first === 'allergens') return last === 'contains' ? 'allergens_contains' : 'allergens_may_contain';
  return byMember[last] ?? named ?? null;
}
