import type { IngredientCsvColumn, IngredientImportPreview } from '#shared/contracts/ingredient.ts';

type ImportRow = IngredientImportPreview['rows'][number];
type ImportError = IngredientImportPreview['errors'][number];

/** What each action means to the person deciding, with a sign so that it is not told by colour alone. */
export const IMPORT_ACTIONS: Readonly<Record<ImportRow['action'], { sign: string; words: string }>> = {
  create: { sign: '+', words: 'new' },
  update: { sign: '↻', words: 'changes' },
  unchanged: { sign: '=', words: 'same' },
  refuse: { sign: '✕', words: 'refused' },
};

/** A row of the file with what is wrong in it. */
export interface CheckedRow extends ImportRow {
  errors: ImportError[];
}

/** The rows with their errors, the refused first: they are what the person has to deal with. */
export function checkedRows(preview: IngredientImportPreview): CheckedRow[] {
  const errorsByRow = new Map<number, ImportError[]>();
  for (const error of preview.errors) {
    errorsByRow.set(error.row, [...(errorsByRow.get(error.row) ?? []), error]);
  }
  const rows = preview.rows.map((row) => ({ ...row, errors: errorsByRow.get(row.row) ?? [] }));
  return rows.sort((a, b) => Number(b.action === 'refuse') - Number(a.action === 'refuse') || a.row - b.row);
}

/** Errors of rows that are not in the preview at all, such as one about the whole file. */
export function fileErrors(preview: IngredientImportPreview): ImportError[] {
  const known = new Set(preview.rows.map((row) => row.row));
  return preview.errors.filter((error) => !known.has(error.row));
}

/** `abv_spread_percent` as a person reads it. */
export function columnWords(column: IngredientCsvColumn): string {
  return column
    .replace(/_g_per_l$/, ' [g/L]')
    .replace(/_g_per_ml$/, ' [g/mL]')
    .replace(/_percent$/, ' [%]')
    .replace(/_g$/, ' [g]')
    .replaceAll('_', ' ');
}
