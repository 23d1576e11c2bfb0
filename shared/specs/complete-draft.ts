import type { FieldError } from '../contracts/problem.ts';
import type { DraftBody, DraftLine, SpecBody, SpecLine } from '../contracts/spec.ts';
import { formatAmount } from '../units/amount.ts';
import { amountOfLine, isBlankLine } from './line-amount.ts';

export type CompletedDraft =
  { readonly ok: true; readonly body: SpecBody } | { readonly ok: false; readonly errors: FieldError[] };

type CompletedLine =
  { readonly ok: true; readonly line: SpecLine } | { readonly ok: false; readonly errors: FieldError[] };

/**
 * Turns a draft into a spec that can be saved as a version.
 *
 * Lines on which nothing was entered, and steps without words, are left out. Whether the ingredients and the glass exist is for
 * the caller to check.
 * @param draft   the draft as it was typed
 * @returns       the spec, or every field that stands in the way, as pointers into the draft
 */
export function completeDraft(draft: DraftBody): CompletedDraft {
  const completed = draft.lines.flatMap((line, index) =>
    isBlankLine(line) ? [] : [completeLine({ line, index })],
  );
  const errors = completed.flatMap((result) => (result.ok ? [] : result.errors));
  if (completed.length === 0) {
    errors.push({ pointer: '#/lines', code: 'min-items', detail: 'A version needs at least one line.' });
  }
  if (errors.length > 0) return { ok: false, errors };
  const lines = completed.flatMap((result) => (result.ok ? [result.line] : []));
  return { ok: true, body: { ...makingOf(draft), lines } };
}

/** The draft that a version is edited as: the same spec with its amounts written out. */
export function draftFromBody(body: SpecBody): DraftBody {
  const lines = body.lines.map(({ amount, ...line }) => ({ ...line, amountText: formatAmount(amount) }));
  return { ...makingOf(body), lines };
}

function completeLine(input: { readonly line: DraftLine; readonly index: number }): CompletedLine {
  const { line, index } = input;
  const { id, ingredientId, stage } = line;
  const amount = amountOfLine(line);
  if (ingredientId !== null && amount.ok) {
    return { ok: true, line: { id, ingredientId, amount: amount.amount, stage, note: line.note.trim() } };
  }
  const errors: FieldError[] = [];
  if (ingredientId === null) {
    const detail = `Line ${index + 1} has no ingredient.`;
    errors.push({ pointer: `#/lines/${index}/ingredientId`, code: 'required', detail });
  }
  if (!amount.ok) {
    const code = amount.reason === 'empty' ? 'required' : amount.reason;
    errors.push({ pointer: `#/lines/${index}/amountText`, code, detail: amount.detail });
  }
  return { ok: false, errors };
}

/** Everything but the lines, field by field, so that nothing else slips through. */
function makingOf(body: DraftBody | SpecBody): Omit<SpecBody, 'lines'> {
  const { method, dilution, ice, glassId, glassIce, partMl } = body;
  return {
    method,
    dilution: { ...dilution },
    ice,
    glassId,
    glassIce: { ...glassIce },
    garnish: body.garnish.trim(),
    build: body.build.map((step) => step.trim()).filter((step) => step !== ''),
    partMl,
  };
}
