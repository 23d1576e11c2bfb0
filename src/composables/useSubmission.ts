import { type Ref, type ShallowRef, ref, shallowRef } from 'vue';

import type { FieldError } from '#shared/contracts/problem.ts';
import { ApiProblem } from '#src/api/http.ts';

export interface Submission {
  isSaving: Ref<boolean>;
  /** What stands in the way other than a named field; null after a success. */
  failure: ShallowRef<unknown>;
  errors: ShallowRef<readonly FieldError[]>;
  /** The message for a field by its JSON Pointer, such as `#/name`. */
  errorAt: (pointer: string) => string | null;
  /** Marks fields from the client's own checks, before anything is sent. */
  refuse: (errors: readonly FieldError[]) => void;
  /** Sends once at a time; true when it worked. */
  submit: (send: () => Promise<unknown>) => Promise<boolean>;
  clear: () => void;
}

/**
 * A form's way to the server and back. Refusals about the fields it names (by JSON Pointer) go to those fields; any
 * other becomes the failure shown above the form, so that none is lost.
 */
export function useSubmission(fields: readonly string[] = []): Submission {
  const isSaving = ref(false);
  const failure = shallowRef<unknown>(null);
  const errors = shallowRef<readonly FieldError[]>([]);

  function clear() {
    failure.value = null;
    errors.value = [];
  }

  async function submit(send: () => Promise<unknown>): Promise<boolean> {
    if (isSaving.value) return false;
    isSaving.value = true;
    clear();
    try {
      await send();
      return true;
    } catch (error) {
      errors.value = (error instanceof ApiProblem ? error.problem.errors : undefined) ?? [];
      const areAllShown = errors.value.every(({ pointer }) => fields.includes(pointer));
      failure.value = errors.value.length > 0 && areAllShown ? null : error;
      return false;
    } finally {
      isSaving.value = false;
    }
  }

  return {
    isSaving,
    failure,
    errors,
    errorAt: (pointer) => errors.value.find((error) => error.pointer === pointer)?.detail ?? null,
    refuse: (found) => {
      failure.value = null;
      errors.value = found;
    },
    submit,
    clear,
  };
}
