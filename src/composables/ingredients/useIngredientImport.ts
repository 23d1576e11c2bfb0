import { type Ref, computed, ref, shallowRef } from 'vue';

import {
  CSV_IMPORT_LIMITS,
  type IngredientImportPreview,
  type IngredientImportResult,
} from '#shared/contracts/ingredient.ts';
import { importIngredients, previewIngredientImport } from '#src/api/ingredients.ts';

export interface IngredientImport {
  csv: Ref<string>;
  fileName: Ref<string | null>;
  preview: Ref<IngredientImportPreview | null>;
  result: Ref<IngredientImportResult | null>;
  isBusy: Ref<boolean>;
  /** Why the file could not be read or imported; null when it could. */
  failure: Ref<unknown>;
  /** Why the file was not even sent; null when it was. */
  refusal: Ref<string | null>;
  /** Rows that an import would write. */
  writeCount: Ref<number>;
  readFile: (file: File) => Promise<void>;
  check: (mapping?: IngredientImportPreview['mapping']) => Promise<void>;
  accept: () => Promise<void>;
  startAgain: () => void;
}

/** An import in three steps: text, preview, written. Nothing is written before the last. */
export function useIngredientImport(teamId: string): IngredientImport {
  const csv = ref('');
  const fileName = ref<string | null>(null);
  const preview = shallowRef<IngredientImportPreview | null>(null);
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

  function refuseReason(text: string): string | null {
    if (text.trim() === '') return 'Choose a file or paste the rows first.';
    if (text.length > CSV_IMPORT_LIMITS.maxCharacters) {
      return `The file has ${text.length} characters; up to ${CSV_IMPORT_LIMITS.maxCharacters} are read. Split it.`;
    }
    return text.includes('\u0000') ? 'This is not a text file. Save it as CSV first.' : null;
  }

  async function check(mapping?: IngredientImportPreview['mapping']) {
    refusal.value = refuseReason(csv.value);
    if (refusal.value !== null) return;
    await busily(async () => {
      preview.value = await previewIngredientImport(teamId, {
        csv: csv.value,
        ...(mapping !== undefined && { mapping }),
      });
    });
  }

  return {
    csv,
    fileName,
    preview,
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
      result.value = null;
      failure.value = null;
      refusal.value = null;
    },
  };
}
