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
import { type CsvMapping, type CsvRecord, mappingOf, readCsv, writeCsv } from './csv-file.ts';
import { Ingredient } from './ingredient.entity.ts';
import { columnsOf, toIngredientWrite } from './ingredient.mapper.ts';
import { findBackBar } from './ingredient.queries.ts';
import { nonsenseIn } from './ingredient.service.ts';

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
export async function applyImport(
  { em, teamId, person }: ActingContext,
  request: IngredientImportRequest,
): Promise<IngredientImportResult> {
  const { preview, existing } = planImport(await findBackBar(em, teamId), request);
  const { create, update, unchanged } = preview.counts;
  if (create + update + unchanged === 0) {
    throw problems.invalidField('#/csv', 'nothing-to-import', 'No row of the file can be taken as it is.');
  }
  for (const { action, name, ingredient } of preview.rows) {
    if (ingredient === null) continue;
    if (action === 'create')
      em.create(Ingredient, { id: randomUUID(), team: teamId, ...columnsOf(ingredient) });
    const known = existing.get(name.toLowerCase());
    if (action === 'update' && known)
      em.assign(known, columnsOf(ingredient), { mergeObjectProperties: false });
  }
  if (create + update > 0) {
    const summary = `Imported ingredients from CSV: ${create} added, ${update} changed`;
    recordEvent(em, {
      teamId,
      person,
      action: 'ingredient.imported',
      subjectType: 'team',
      subjectId: teamId,
      summary,
    });
  }
  await em.flush();
  return { created: create, updated: update, unchanged };
}

interface ImportPlan {
  preview: IngredientImportPreview;
  /** The back bar by lower-cased name. */
  existing: ReadonlyMap<string, Ingredient>;
}

function planImport(backBar: readonly Ingredient[], request: IngredientImportRequest): ImportPlan {
  const file = readCsv(request.csv);
  const mapping = mappingOf(file, request.mapping);
  if (mapping.name === undefined) {
    throw problems.invalidField('#/mapping/name', 'required', 'Say which column of the file holds the name.');
  }
  const existing = new Map(backBar.map((ingredient) => [ingredient.name.toLowerCase(), ingredient]));
  const seen = new Map<string, number>();
  const errors: ImportError[] = [];
  const rows = file.records.map((record) => planRow({ record, mapping, existing, seen, errors }));
  const count = (action: PreviewRow['action']) => rows.filter((row) => row.action === action).length;
  const counts = {
    create: count('create'),
    update: count('update'),
    unchanged: count('unchanged'),
    refuse: count('refuse'),
  };
  return { preview: { headings: file.headings, mapping, rows, errors, counts }, existing };
}

function planRow(input: {
  record: CsvRecord;
  mapping: CsvMapping;
  existing: ReadonlyMap<string, Ingredient>;
  seen: Map<string, number>;
  errors: ImportError[];
}): PreviewRow {
  const { record, mapping, existing, seen, errors } = input;
  const cell = (column: IngredientCsvColumn) => {
    const index = mapping[column];
    return index === undefined ? undefined : (record.cells[index] ?? '');
  };
  const name = (cell('name') ?? '').trim();
  const key = name.toLowerCase();
  const known = existing.get(key);
  const present = known ? csvRow(toIngredientWrite(known)) : null;
  const result = readCsvRow(
    (column) => cell(column) ?? present?.[INGREDIENT_CSV_COLUMNS.indexOf(column)] ?? '',
  );

  const found = result.ok ? problemsOf(result.write) : result.problems;
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
function problemsOf(write: IngredientWrite): RowProblem[] {
  return [...contractErrors(write), ...nonsenseIn(write)].map(({ pointer, detail }) => ({
    column: columnOfPointer(pointer),
    value: '',
    detail,
  }));
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
