import { type Ref, computed, ref, shallowRef } from 'vue';

import {
  CSV_IMPORT_LIMITS,
  type IngredientImportPreview,
  type IngredientImportResult,
} from '#shared/contracts/ingredient.ts';
import { ApiProblem } from '#src/api/http.ts';
import { importIngredients, previewIngredientImport } from '#src/api/ingredients.ts';

export type ColumnMapping = IngredientImportPreview['mapping'];

export interface IngredientImport {
  csv: Ref<string>;
  fileName: Ref<string | null>;
  preview: Ref<IngredientImportPreview | null>;
  /** Columns of the file and what is read from them; null before anything could be read. */
  columns: Ref<{ headings: string[]; mapping: ColumnMapping } | null>;
  result: Ref<IngredientImportResult | null>;
  isBusy: Ref<boolean>;
  /** Why the file could not be read or imported; null when it could. */
  failure: Ref<unknown>;
  /** Why the file was not even sent; null when it was. */
  refusal: Ref<string | null>;
  /** Rows that an import would write. */
  writeCount: Ref<number>;
  readFile: (file: File) => Promise<void>;
  check: (mapping?: ColumnMapping) => Promise<void>;
  accept: () => Promise<void>;
  startAgain: () => void;
}

/** An import in three steps: text, preview, written. Nothing is written before the last. */
export function useIngredientImport(teamId: string): IngredientImport {
  const csv = ref('');
  const fileName = ref<string | null>(null);
  const preview = shallowRef<IngredientImportPreview | null>(null);
  const columns = shallowRef<{ headings: string[]; mapping: ColumnMapping } | null>(null);
  const result = shallowRef<IngredientImportResult | null>(null);
  const isBusy = ref(false);
  const failure = shallowRef<unknown>(null);
  const refusal = ref<string | null>(null);

  async function busily(task: () => Promise<void>) {
    if (isBusy.value) return;
    isBusy.value = true;
    failure.value = null;
    try {
      await task();
    } catch (error) {
      failure.value = error;
    } finally {
      isBusy.value = false;
    }
  }

  async function check(mapping?: ColumnMapping) {
    refusal.value = refuseReason(csv.value);
    if (refusal.value !== null) return;
    await busily(async () => {
      preview.value = null;
      try {
        preview.value = await previewIngredientImport(teamId, {
          csv: csv.value,
          ...(mapping !== undefined && { mapping }),
        });
        columns.value = preview.value;
      } catch (error) {
        // Without a column of names there is no preview, but the person can still say which column it is.
        if (isAboutMapping(error)) {
          columns.value = { headings: await headingsOf(csv.value), mapping: mapping ?? {} };
        }
        throw error;
      }
    });
  }

  return {
    csv,
    fileName,
    preview,
    columns,
    result,
    isBusy,
    failure,
    refusal,
    writeCount: computed(() => {
      const counts = preview.value?.counts;
      return counts === undefined ? 0 : counts.create + counts.update;
    }),
    async readFile(file) {
      fileName.value = file.name;
      csv.value = await file.text();
      await check();
    },
    check,
    accept: () =>
      busily(async () => {
        if (preview.value === null) return;
        const { mapping } = preview.value;
        result.value = await importIngredients(teamId, { csv: csv.value, mapping });
      }),
    startAgain() {
      csv.value = '';
      fileName.value = null;
      preview.value = null;
      columns.value = null;
      result.value = null;
      failure.value = null;
      refusal.value = null;
    },
  };
}

function refuseReason(text: string): string | null {
  if (text.trim() === '') return 'Choose a file or paste the rows first.';
  if (text.length > CSV_IMPORT_LIMITS.maxCharacters) {
    return `The file has ${text.length} characters; up to ${CSV_IMPORT_LIMITS.maxCharacters} are read. Split it.`;
  }
  return text.includes('\u0000') ? 'This is not a text file. Save it as CSV first.' : null;
}

function isAboutMapping(error: unknown): boolean {
  return (
    error instanceof ApiProblem &&
    (error.problem.errors ?? []).some(({ pointer }) => pointer.startsWith('#/mapping'))
  );
}

/** The first line of the file, cell by cell; the reader is fetched only when it is needed. */
async function headingsOf(text: string): Promise<string[]> {
  const { default: Papa } = await import('papaparse');
  const { data } = Papa.parse<string[]>(text, { preview: 1 });
  return data[0] ?? [];
}
