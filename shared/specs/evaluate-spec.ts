import type { GlassSnapshot } from '../contracts/glass.ts';
import type { DraftBody, SpecBody } from '../contracts/spec.ts';
import type { Figures, IngredientSnapshot } from '../contracts/version.ts';
import type { HouseMeasures } from '../units/house-measures.ts';

export interface SpecToEvaluate {
  readonly body: DraftBody | SpecBody;
  readonly ingredients: ReadonlyMap<string, IngredientSnapshot>;
  readonly glass: GlassSnapshot | null;
  readonly houseMeasures: HouseMeasures;
}

export type LineProblem =
  'empty' | 'no-ingredient' | 'no-amount' | 'unreadable-amount' | 'unknown-ingredient' | 'piece-mass-missing';

/** What one line brings into the drink, before ice. */
export interface ComputedLine {
  readonly lineId: string;
  readonly ok: true;
  readonly volumeMl: number;
  readonly massG: number;
  readonly ethanolG: number;
  readonly sugarG: number;
  readonly acidCitricG: number;
}

export interface UncomputedLine {
  readonly lineId: string;
  readonly ok: false;
  readonly reason: LineProblem;
  /** One sentence for a person. */
  readonly detail: string;
}

export type EvaluatedLine = ComputedLine | UncomputedLine;

export interface SpecEvaluation {
  /** null only when no line at all can be computed. */
  readonly figures: Figures | null;
  readonly lines: readonly EvaluatedLine[];
}

export function evaluateSpec(_input: SpecToEvaluate): SpecEvaluation {
  throw new Error('being written');
}
