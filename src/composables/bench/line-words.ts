/** What stands at the fields of a line. */
import type { FieldError } from '#shared/contracts/problem.ts';
import type { DraftBody, DraftLine } from '#shared/contracts/spec.ts';
import type { EvaluatedLine, SpecEvaluation } from '#shared/specs/evaluate-spec.ts';
import { amountOfLine } from '#shared/specs/line-amount.ts';
import type { VolumeUnit } from '#shared/text/format-quantity.ts';
import { showAmountIn } from '#shared/text/show-amount.ts';
import { formatAmount } from '#shared/units/amount.ts';

interface LineProblemInput {
  readonly evaluated: EvaluatedLine | null;
  /** What stood in the way when a version was to be saved, by pointer into the draft. */
  readonly errors: readonly FieldError[];
  readonly index: number;
}

const AT_AMOUNT = new Set(['unreadable-amount', 'too-large']);
const AT_INGREDIENT = new Set(['unknown-ingredient', 'piece-mass-missing', 'composition-does-not-fit']);

function errorAt(input: LineProblemInput, member: keyof DraftLine): string | null {
  const pointer = `#/lines/${input.index}/${member}`;
  return input.errors.find((error) => error.pointer === pointer)?.detail ?? null;
}

/** What is wrong with the amount; a missing one is no mistake before a version is to be saved. */
export function amountProblem(input: LineProblemInput): string | null {
  const { evaluated } = input;
  if (evaluated !== null && !evaluated.ok && AT_AMOUNT.has(evaluated.reason)) return evaluated.detail;
  return errorAt(input, 'amountText');
}

export function ingredientProblem(input: LineProblemInput): string | null {
  const { evaluated } = input;
  if (evaluated !== null && !evaluated.ok && AT_INGREDIENT.has(evaluated.reason)) return evaluated.detail;
  return errorAt(input, 'ingredientId');
}

/** `≈ 0.75 oz` beside 22.5 ml for somebody who reads ounces; empty where it is written in that unit. */
export function amountInOtherUnit(input: { line: DraftLine; volumeUnit: VolumeUnit }): string {
  const read = amountOfLine(input.line);
  if (!read.ok) return '';
  const shown = showAmountIn(read.amount, input.volumeUnit);
  return shown === formatAmount(read.amount) ? '' : shown;
}

/** Lines that are begun and not in the figures, by name where they have one. */
export function linesLeftOut(input: {
  draft: DraftBody;
  evaluation: SpecEvaluation;
  nameOf: (ingredientId: string) => string | null;
}): string[] {
  return input.draft.lines.flatMap((line, index) => {
    const evaluated = input.evaluation.lines[index];
    if (evaluated === undefined || evaluated.ok || evaluated.reason === 'empty') return [];
    const name = line.ingredientId === null ? null : input.nameOf(line.ingredientId);
    return [name ?? `line ${index + 1}`];
  });
}
