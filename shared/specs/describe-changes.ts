import type { Version } from '../contracts/version.ts';
import { describeFigureChanges } from './describe-figures.ts';
import { describeIngredientChanges } from './describe-ingredients.ts';
import { describeLineChanges } from './describe-lines.ts';
import { describeMakingChanges } from './describe-making.ts';

/** One side of a comparison; a version is one as it stands. */
export type DescribedSide = Pick<Version, 'body' | 'ingredients' | 'glass' | 'figures'>;

/**
 * What changed between two versions, in the words of a bar: first what somebody did, then the figures that moved.
 *
 * @param input.before   the version it started from
 * @param input.after    the version it became
 * @returns              sentences such as `lime juice 22.5 → 20 ml` and `final acid 8.4 → 7.6 g/L`, in ml and °C;
 *                       none when nothing changed
 */
export function describeChanges(input: {
  readonly before: DescribedSide;
  readonly after: DescribedSide;
}): string[] {
  const { before, after } = input;
  return [
    ...describeLineChanges({
      before: { lines: before.body.lines, ingredients: before.ingredients },
      after: { lines: after.body.lines, ingredients: after.ingredients },
    }),
    ...describeMakingChanges(input),
    ...describeIngredientChanges({ before: before.ingredients, after: after.ingredients }),
    ...describeFigureChanges({ before: before.figures, after: after.figures }),
  ];
}
