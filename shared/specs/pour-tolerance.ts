import type { DraftBody, SpecBody } from '../contracts/spec.ts';
import { lineMeasureToleranceMl } from '../physics/measure-tolerance.ts';
import type { AmountUnit } from '../units/amount.ts';
import type { SpecEvaluation } from './evaluate-spec.ts';
import { amountOfLine } from './line-amount.ts';

/** Amounts that are poured by a measure; dashes, drops, pieces and grams are not. */
const POURED: ReadonlySet<AmountUnit> = new Set(['ml', 'cl', 'oz', 'part']);
/** Less is spooned or dropped, whatever it is written in: no measure is made for it [mL]. */
const SMALLEST_POUR_ML = 5;

/**
 * How far the finished drink can be off when every measure it is poured with is as far off as the law allows, all in one direction.
 *
 * An error in the mix is diluted like the mix. Null when nothing is poured by a measure.
 * @param input.body         the draft or spec
 * @param input.evaluation   what `evaluateSpec` made of it
 * @returns                  error of the final volume in either direction [mL]
 */
export function pourToleranceMl(input: {
  readonly body: DraftBody | SpecBody;
  readonly evaluation: SpecEvaluation;
}): number | null {
  const { body, evaluation } = input;
  const dilutionFraction = evaluation.figures?.dilutionFraction ?? 0;
  const tolerances = body.lines.flatMap((line, index) => {
    const read = amountOfLine(line);
    const evaluated = evaluation.lines[index];
    if (!read.ok || !POURED.has(read.amount.unit) || evaluated?.ok !== true) return [];
    if (evaluated.volumeMl < SMALLEST_POUR_ML) return [];
    const toleranceMl = lineMeasureToleranceMl(evaluated.volumeMl);
    return [line.stage === 'mix' ? toleranceMl * (1 + dilutionFraction) : toleranceMl];
  });
  return tolerances.length === 0 ? null : tolerances.reduce((sum, each) => sum + each, 0);
}
