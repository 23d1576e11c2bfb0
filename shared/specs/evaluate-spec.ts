import type { GlassSnapshot } from '../contracts/glass.ts';
import type { DraftBody, SpecBody } from '../contracts/spec.ts';
import type { Figures, IngredientSnapshot } from '../contracts/version.ts';
import { type FinishedDrink, finishedDrink } from '../physics/finished-drink.ts';
import { washLineOf } from '../physics/glass.ts';
import type { Portion } from '../physics/mixing.ts';
import type { HouseMeasures } from '../units/house-measures.ts';
import { allergensOf } from './allergens.ts';
import { type EvaluatedLine, portionOfLine } from './line-portions.ts';

export type { ComputedLine, EvaluatedLine, LineProblem, UncomputedLine } from './line-portions.ts';

export interface SpecToEvaluate {
  readonly body: DraftBody | SpecBody;
  readonly ingredients: ReadonlyMap<string, IngredientSnapshot>;
  readonly glass: GlassSnapshot | null;
  readonly houseMeasures: HouseMeasures;
}

export interface SpecEvaluation {
  /** null only when no line at all can be computed. */
  readonly figures: Figures | null;
  /** One for each line of the body, in its order. */
  readonly lines: readonly EvaluatedLine[];
}

/**
 * Works out every figure of a spec, whether it is finished or still being written.
 *
 * Lines that cannot be computed are left out of the figures and reported; allergens come from every line with an
 * ingredient all the same.
 * @param input.body            a draft or a complete spec
 * @param input.ingredients     the ingredients by id
 * @param input.glass           the glass it is served in; null for no wash line
 * @param input.houseMeasures   what the team's dash, bar spoon and drop hold [mL]
 * @returns                     figures of the finished drink at 20 C, and what each line brings
 */
export function evaluateSpec(input: SpecToEvaluate): SpecEvaluation {
  const { body, ingredients } = input;
  const mixPortions: Portion[] = [];
  const topPortions: Portion[] = [];
  const lines = body.lines.map((line): EvaluatedLine => {
    const { houseMeasures } = input;
    const result = portionOfLine({ line, ingredients, houseMeasures, partMl: body.partMl });
    if (result.ok) (line.stage === 'mix' ? mixPortions : topPortions).push(result.portion);
    return result.line;
  });
  if (mixPortions.length + topPortions.length === 0) return { figures: null, lines };
  const { dilution, method } = body;
  const drink = finishedDrink({ mixPortions, topPortions, dilution, method });
  const inGlass = washLineInGlass({ drink, glass: input.glass, glassIce: body.glassIce });
  const ingredientIds = body.lines.map((line) => line.ingredientId);
  const figures: Figures = {
    ...drink,
    washLine: inGlass.washLine,
    allergens: allergensOf({ ingredientIds, ingredients }),
    warnings: [...drink.warnings, ...inGlass.warnings],
  };
  return { figures, lines };
}

function washLineInGlass(input: {
  readonly drink: FinishedDrink;
  readonly glass: GlassSnapshot | null;
  readonly glassIce: SpecBody['glassIce'];
}): Pick<Figures, 'washLine' | 'warnings'> {
  const { drink, glass, glassIce } = input;
  if (glass === null) return { washLine: null, warnings: [] };
  return washLineOf({
    profile: glass.profile,
    drinkMl: drink.finalMl,
    drinkDensityGPerMl: drink.densityGPerMl,
    iceMassG: glassIce.kind === 'none' ? 0 : glassIce.massG,
  });
}
