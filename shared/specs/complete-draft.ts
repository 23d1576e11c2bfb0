import type { FieldError } from '../contracts/problem.ts';
import type { DraftBody, SpecBody } from '../contracts/spec.ts';

export type CompletedDraft =
  { readonly ok: true; readonly body: SpecBody } | { readonly ok: false; readonly errors: FieldError[] };

export function completeDraft(_draft: DraftBody): CompletedDraft {
  throw new Error('being written');
}

export function draftFromBody(_body: SpecBody): DraftBody {
  throw new Error('being written');
}
