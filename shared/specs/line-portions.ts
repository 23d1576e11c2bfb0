import { SPEC_LIMITS, type DraftLine, type SpecLine } from '../contracts/spec.ts';
import type { IngredientSnapshot } from '../contracts/version.ts';
import { acidAsCitric } from '../physics/acids.ts';
import { ACID_KEYS, type Composition } from '../physics/composition.ts';
import { type Contents, contentsPerMl } from '../physics/contents.ts';
import { DomainError } from '../physics/domain-error.ts';
import { DRINK_VOLUME_RANGE_ML } from '../physics/finished-drink.ts';
import { type Portion, massGOfContents } from '../physics/mixing.ts';
import { measureOfAmount } from '../units/amount.ts';
import type { HouseMeasures } from '../units/house-measures.ts';
import { amountOfLine, isBlankLine } from './line-amount.ts';

/** Why nothing was computed for a line. */
export type LineProblem =
  | 'empty'
  | 'no-ingredient'
  | 'no-amount'
  | 'unreadable-amount'
  | 'unknown-ingredient'
  | 'piece-mass-missing'
  | 'too-large'
  | 'composition-does-not-fit';

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

/** A line with the liquid it stands for. */
export type LinePortion =
  | { readonly ok: true; readonly line: ComputedLine; readonly portion: Portion }
  | { readonly ok: false; readonly line: UncomputedLine };

/** With as many lines as a spec may have, all of this size, the drink is still one that can be computed [mL]. */
const MAX_LINE_ML = DRINK_VOLUME_RANGE_ML.max / SPEC_LIMITS.lines;
const ML_PER_L = 1000;

/**
 * Turns one line into millilitres of its liquid.
 *
 * @param input.line            a line of a draft or of a version
 * @param input.ingredients     the ingredients by id
 * @param input.houseMeasures   what the team's dash, bar spoon and drop hold [mL]
 * @param input.partMl          what one part is [mL]
 * @returns                     volume, mass and contents of the line, or why there are none
 */
export function portionOfLine(input: {
  readonly line: DraftLine | SpecLine;
  readonly ingredients: ReadonlyMap<string, IngredientSnapshot>;
  readonly houseMeasures: HouseMeasures;
  readonly partMl: number;
}): LinePortion {
  const { line, ingredients, houseMeasures, partMl } = input;
  if (isBlankLine(line)) return problem(line, 'empty', 'Nothing is on this line yet.');
  if (line.ingredientId === null) return problem(line, 'no-ingredient', 'Choose an ingredient.');
  const read = amountOfLine(line);
  if (!read.ok) {
    return problem(line, read.reason === 'empty' ? 'no-amount' : 'unreadable-amount', read.detail);
  }
  const ingredient = ingredients.get(line.ingredientId);
  if (ingredient === undefined)
    return problem(line, 'unknown-ingredient', 'This ingredient cannot be found.');
  const liquid = liquidOf(ingredient.composition);
  if (liquid === undefined) {
    const detail = `${ingredient.name} holds more than fits into a litre: check its composition.`;
    return problem(line, 'composition-does-not-fit', detail);
  }
  const measure = measureOfAmount({ amount: read.amount, houseMeasures, partMl });
  if (measure.kind === 'volume') return portion({ line, ingredient, liquid, volumeMl: measure.volumeMl });
  if (measure.kind === 'mass') {
    return portion({ line, ingredient, liquid, volumeMl: measure.massG / liquid.densityGPerMl });
  }
  if (ingredient.pieceMassG === null) {
    const detail = `What one piece of ${ingredient.name} weighs is not known: enter it, or write ml or g.`;
    return problem(line, 'piece-mass-missing', detail);
  }
  const massG = measure.pieces * ingredient.pieceMassG;
  return portion({ line, ingredient, liquid, volumeMl: massG / liquid.densityGPerMl });
}

function portion(input: {
  readonly line: DraftLine | SpecLine;
  readonly ingredient: IngredientSnapshot;
  readonly liquid: Liquid;
  readonly volumeMl: number;
}): LinePortion {
  const { line, ingredient, liquid, volumeMl } = input;
  if (volumeMl > MAX_LINE_ML) {
    const limitL = Math.floor(MAX_LINE_ML / ML_PER_L);
    return problem(line, 'too-large', `This is more than ${limitL} litres on one line: write less.`);
  }
  const { contents } = liquid;
  return {
    ok: true,
    portion: { contentsPerMl: contents, volumeMl, name: ingredient.name },
    line: {
      lineId: line.id,
      ok: true,
      volumeMl,
      massG: liquid.densityGPerMl * volumeMl,
      ethanolG: contents.ethanolG * volumeMl,
      sugarG: contents.sugarG * volumeMl,
      acidCitricG: liquid.acidCitricGPerMl * volumeMl,
    },
  };
}

function problem(line: DraftLine | SpecLine, reason: LineProblem, detail: string): LinePortion {
  return { ok: false, line: { lineId: line.id, ok: false, reason, detail } };
}

/** What follows from a composition alone, kept since it is looked up again with every keystroke. */
interface Liquid {
  readonly contents: Contents;
  readonly densityGPerMl: number;
  readonly acidCitricGPerMl: number;
  /** The composition it was worked out for: the object may be edited afterwards. */
  readonly composition: Composition;
}

const liquids = new WeakMap<Composition, Liquid>();

/** The liquid of a composition; undefined where its parts do not fit into a litre together. */
function liquidOf(composition: Composition): Liquid | undefined {
  const kept = liquids.get(composition);
  if (kept !== undefined && isSameComposition(kept.composition, composition)) return kept;
  const liquid = workOutLiquid(composition);
  if (liquid !== undefined) liquids.set(composition, liquid);
  return liquid;
}

function workOutLiquid(composition: Composition): Liquid | undefined {
  try {
    const contents = contentsPerMl(composition);
    return {
      contents,
      densityGPerMl: massGOfContents(contents),
      acidCitricGPerMl: acidAsCitric(contents.acidsG),
      composition: { ...composition, acidsGPerL: { ...composition.acidsGPerL } },
    };
  } catch (error) {
    if (error instanceof DomainError) return undefined;
    throw error;
  }
}

function isSameComposition(one: Composition, other: Composition): boolean {
  return (
    one.abvFraction === other.abvFraction &&
    one.sugarGPerL === other.sugarGPerL &&
    one.densityGPerMl === other.densityGPerMl &&
    ACID_KEYS.every((acid) => one.acidsGPerL[acid] === other.acidsGPerL[acid])
  );
}
