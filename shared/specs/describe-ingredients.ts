import { ACID_KEYS, type Composition } from '../physics/composition.ts';
import type { AllergenReview } from '../contracts/ingredient.ts';
import type { IngredientSnapshot } from '../contracts/version.ts';
import { changeText } from '../text/change-text.ts';
import { formatTrimmed } from '../text/format-number.ts';

/** What is known better or otherwise of an ingredient that both versions use. */
export function describeIngredientChanges(input: {
  readonly before: readonly IngredientSnapshot[];
  readonly after: readonly IngredientSnapshot[];
}): string[] {
  const known = new Map(input.before.map((ingredient) => [ingredient.id, ingredient]));
  return input.after.flatMap((after) => {
    const before = known.get(after.id);
    return before === undefined ? [] : describeIngredient({ before, after });
  });
}

function describeIngredient(input: {
  readonly before: IngredientSnapshot;
  readonly after: IngredientSnapshot;
}): string[] {
  const { before, after } = input;
  const sentences: string[] = [];
  if (before.name !== after.name)
    sentences.push(`renamed ${changeText({ from: before.name, to: after.name })}`);
  const values = measuredChanges(input);
  if (values.length > 0) sentences.push(`${after.name} measured again: ${values.join(', ')}`);
  const [from, to] = [allergenText(before.allergens), allergenText(after.allergens)];
  if (from !== to) sentences.push(`allergens of ${after.name}: ${changeText({ from, to })}`);
  return sentences;
}

function measuredChanges(input: {
  readonly before: IngredientSnapshot;
  readonly after: IngredientSnapshot;
}): string[] {
  const [before, after] = [input.before.composition, input.after.composition];
  const changes = [
    describeValue({ subject: 'ABV', from: percent(before), to: percent(after), unit: '%', decimals: 2 }),
    describeValue({
      subject: 'sugar',
      from: before.sugarGPerL,
      to: after.sugarGPerL,
      unit: 'g/L',
      decimals: 1,
    }),
    ...ACID_KEYS.map((acid) => {
      const [from, to] = [before.acidsGPerL[acid] ?? 0, after.acidsGPerL[acid] ?? 0];
      return describeValue({ subject: `${acid} acid`, from, to, unit: 'g/L', decimals: 2 });
    }),
    describeValue({
      subject: 'density',
      from: before.densityGPerMl,
      to: after.densityGPerMl,
      unit: 'g/ml',
      decimals: 4,
    }),
    describeValue({
      subject: 'one piece',
      from: input.before.pieceMassG,
      to: input.after.pieceMassG,
      unit: 'g',
      decimals: 1,
    }),
  ];
  return changes.filter((change) => change !== undefined);
}

function percent(composition: Composition): number {
  return composition.abvFraction * 100;
}

/** A change that shows at the digits people enter; a value that was not given is `not given`. */
function describeValue(input: {
  readonly subject: string;
  readonly from: number | null;
  readonly to: number | null;
  readonly unit: string;
  readonly decimals: number;
}): string | undefined {
  const { subject, unit, decimals } = input;
  const shown = (value: number | null): string =>
    value === null ? 'not given' : formatTrimmed({ value, decimals });
  const [from, to] = [shown(input.from), shown(input.to)];
  if (from === to) return undefined;
  const fromUnit = input.from === null ? '' : unit;
  const toUnit = input.to === null ? '' : unit;
  return `${subject} ${changeText({ from, to, fromUnit, toUnit })}`;
}

function allergenText(review: AllergenReview): string {
  const parts = [
    ...(review.reviewed ? [] : ['not reviewed']),
    ...(review.contains.length > 0 ? [`contains ${[...review.contains].sort().join(', ')}`] : []),
    ...(review.mayContain.length > 0 ? [`may contain ${[...review.mayContain].sort().join(', ')}`] : []),
  ];
  return parts.length === 0 ? 'none' : parts.join('; ');
}
