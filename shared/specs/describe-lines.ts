import type { LineStage, SpecLine } from '../contracts/spec.ts';
import type { IngredientSnapshot } from '../contracts/version.ts';
import { changeText, describeTextChange } from '../text/change-text.ts';
import { formatAmount, unitText } from '../units/amount.ts';
import { longestRising } from './longest-rising.ts';
import { matchLines } from './match-lines.ts';

/** The lines of one version, with the ingredients it remembers. */
export interface DescribedLines {
  readonly lines: readonly SpecLine[];
  readonly ingredients: readonly IngredientSnapshot[];
}

interface LinePair {
  readonly before: SpecLine;
  readonly after: SpecLine;
  readonly beforeIndex: number;
}

const STAGE_WORDS: Readonly<Record<LineStage, string>> = {
  mix: 'now goes into the mix',
  top: 'is now added on top',
};

/** What happened to the lines: swapped, changed, added, removed, moved. */
export function describeLineChanges(input: {
  readonly before: DescribedLines;
  readonly after: DescribedLines;
}): string[] {
  const { before, after } = input;
  const rows = before.lines.map((line) => [line]);
  const matches = matchLines({ rows, lines: after.lines });
  const nameBefore = namesOf(before);
  const nameAfter = namesOf(after);
  const pairs = after.lines.map((line, index) => pairOf({ line, beforeIndex: matches[index], before }));
  const changed = after.lines.flatMap((line, index) => {
    const pair = pairs[index];
    if (pair === undefined) return [`added ${nameAfter(line)} ${formatAmount(line.amount)}${onTop(line)}`];
    return describePair({ pair, nameBefore, nameAfter });
  });
  const kept = new Set(matches);
  const removed = before.lines.flatMap((line, index) =>
    kept.has(index) ? [] : [`removed ${nameBefore(line)} ${formatAmount(line.amount)}`],
  );
  return [...changed, ...removed, ...describeOrder({ lines: after.lines, pairs, nameAfter })];
}

function namesOf(side: DescribedLines): (line: SpecLine) => string {
  const names = new Map(side.ingredients.map((ingredient) => [ingredient.id, ingredient.name]));
  return (line) => names.get(line.ingredientId) ?? 'an unknown ingredient';
}

function pairOf(input: {
  readonly line: SpecLine;
  readonly beforeIndex: number | undefined;
  readonly before: DescribedLines;
}): LinePair | undefined {
  if (input.beforeIndex === undefined) return undefined;
  const before = input.before.lines[input.beforeIndex];
  return before && { before, after: input.line, beforeIndex: input.beforeIndex };
}

function onTop(line: SpecLine): string {
  return line.stage === 'top' ? ' on top' : '';
}

function describePair(input: {
  readonly pair: LinePair;
  readonly nameBefore: (line: SpecLine) => string;
  readonly nameAfter: (line: SpecLine) => string;
}): string[] {
  const { before, after } = input.pair;
  const name = input.nameAfter(after);
  const isSwapped = before.ingredientId !== after.ingredientId;
  const amountBefore = formatAmount(before.amount);
  const amountAfter = formatAmount(after.amount);
  const sentences: (string | undefined)[] = [];
  if (isSwapped && amountBefore === amountAfter) {
    sentences.push(`swapped ${input.nameBefore(before)} for ${name}, ${amountAfter}`);
  } else if (isSwapped) {
    sentences.push(`swapped ${input.nameBefore(before)} ${amountBefore} for ${name} ${amountAfter}`);
  } else if (amountBefore !== amountAfter) {
    sentences.push(`${name} ${amountChange(input.pair)}`);
  }
  if (before.stage !== after.stage) sentences.push(`${name} ${STAGE_WORDS[after.stage]}`);
  sentences.push(describeTextChange({ subject: `note on ${name}`, from: before.note, to: after.note }));
  return sentences.filter((sentence) => sentence !== undefined);
}

/** `22.5 → 20 ml`; the unit is written once when it stays. */
function amountChange(pair: LinePair): string {
  const [before, after] = [pair.before.amount, pair.after.amount];
  const toUnit = unitText(after);
  const fromUnit = before.unit === after.unit ? toUnit : unitText(before);
  return changeText({
    from: numberText(formatAmount(before)),
    to: numberText(formatAmount(after)),
    fromUnit,
    toUnit,
  });
}

/** The number of a written amount: everything that stands before its unit. */
function numberText(amountText: string): string {
  return amountText.replace(/ [a-z].*$/, '');
}

/** Lines that left the order the others kept, each with its new place. */
function describeOrder(input: {
  readonly lines: readonly SpecLine[];
  readonly pairs: readonly (LinePair | undefined)[];
  readonly nameAfter: (line: SpecLine) => string;
}): string[] {
  const { lines, pairs, nameAfter } = input;
  const old = pairs.filter((pair) => pair !== undefined).map((pair) => pair.beforeIndex);
  const stayed = new Set(longestRising(old));
  return lines.flatMap((line, index) => {
    const pair = pairs[index];
    if (pair === undefined || stayed.has(pair.beforeIndex)) return [];
    const previous = lines[index - 1];
    return [
      `${nameAfter(line)} moved ${previous === undefined ? 'to the start' : `after ${nameAfter(previous)}`}`,
    ];
  });
}
