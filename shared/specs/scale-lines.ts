import type { FieldError } from '../contracts/problem.ts';
import type { DraftBody, DraftLine } from '../contracts/spec.ts';
import { roundedAmount } from '../text/show-amount.ts';
import { formatAmount, parseAmount } from '../units/amount.ts';
import type { SpecEvaluation } from './evaluate-spec.ts';
import { amountOfLine } from './line-amount.ts';

export type ScaledDraft =
  { readonly ok: true; readonly draft: DraftBody } | { readonly ok: false; readonly errors: FieldError[] };

export type ScaleFactor =
  | { readonly ok: true; readonly factor: number }
  | {
      readonly ok: false;
      readonly reason: 'nothing-computed' | 'incomplete' | 'out-of-range';
      readonly detail: string;
    };

/** From a thousandth of a spec to a thousand serves. */
export const SCALE_FACTOR_RANGE = { min: 0.001, max: 1000 } as const;

/**
 * Multiplies the amount of every line; units stay as typed, and four digits are kept.
 *
 * @param input.draft    the draft; lines without an amount stay as they are
 * @param input.factor   number of serves, or `factorForTotalVolume` (0.001 to 1000)
 * @returns              the scaled draft; refused, with every line in the way, when an amount cannot be read or would
 *                       leave the limits of an amount. Ice in the glass and weighed masses are not scaled
 */
export function scaleDraft(input: { readonly draft: DraftBody; readonly factor: number }): ScaledDraft {
  const { draft, factor } = input;
  if (!isScaleFactor(factor)) {
    return { ok: false, errors: [{ pointer: '#/factor', code: 'out-of-range', detail: outOfRange(factor) }] };
  }
  if (factor === 1) return { ok: true, draft };
  const scaled = draft.lines.map((line, index) => scaleLine({ line, index, factor }));
  const errors = scaled.flatMap((result) => (result.ok ? [] : [result.error]));
  if (errors.length > 0) return { ok: false, errors };
  return {
    ok: true,
    draft: { ...draft, lines: scaled.flatMap((result) => (result.ok ? [result.line] : [])) },
  };
}

/**
 * The factor by which all lines grow to make a wanted volume. Dilution goes with the mix, so the volume goes with the factor.
 *
 * @param input.evaluation   what `evaluateSpec` made of the draft
 * @param input.targetMl     wanted volume [mL]
 * @param input.of           the finished drink (default), or the mix before ice and top
 * @returns                  the factor, or why there is none: a line that cannot be computed leaves the total unknown
 */
export function factorForTotalVolume(input: {
  readonly evaluation: SpecEvaluation;
  readonly targetMl: number;
  readonly of?: 'finalMl' | 'undilutedMl';
}): ScaleFactor {
  const { figures, lines } = input.evaluation;
  const problem = lines.find((line) => !line.ok && line.reason !== 'empty');
  if (problem !== undefined) {
    return {
      ok: false,
      reason: 'incomplete',
      detail: 'Complete every line first: the total is not known yet.',
    };
  }
  const presentMl = figures?.[input.of ?? 'finalMl'] ?? 0;
  if (presentMl <= 0) {
    return {
      ok: false,
      reason: 'nothing-computed',
      detail: 'There is nothing to scale yet: write a line first.',
    };
  }
  const factor = input.targetMl / presentMl;
  return isScaleFactor(factor)
    ? { ok: true, factor }
    : { ok: false, reason: 'out-of-range', detail: outOfRange(factor) };
}

type ScaledLine =
  { readonly ok: true; readonly line: DraftLine } | { readonly ok: false; readonly error: FieldError };

function scaleLine(input: {
  readonly line: DraftLine;
  readonly index: number;
  readonly factor: number;
}): ScaledLine {
  const { line, index, factor } = input;
  if (line.amountText.trim() === '') return { ok: true, line };
  const read = amountOfLine(line);
  if (!read.ok) return { ok: false, error: errorAt({ index, code: read.reason, detail: read.detail }) };
  const { unit } = read.amount;
  const amountText = formatAmount(roundedAmount({ value: read.amount.value * factor, unit }));
  const again = parseAmount(amountText, { defaultUnit: unit });
  if (!again.ok) return { ok: false, error: errorAt({ index, code: again.reason, detail: again.detail }) };
  return { ok: true, line: { ...line, amountText } };
}

function errorAt(input: {
  readonly index: number;
  readonly code: string;
  readonly detail: string;
}): FieldError {
  return { pointer: `#/lines/${input.index}/amountText`, code: input.code, detail: input.detail };
}

function isScaleFactor(factor: number): boolean {
  return factor >= SCALE_FACTOR_RANGE.min && factor <= SCALE_FACTOR_RANGE.max;
}

function outOfRange(factor: number): string {
  const { min, max } = SCALE_FACTOR_RANGE;
  return `Lines can be scaled by ${min} to ${max}; this would be ${Number(factor.toPrecision(3))}.`;
}
