import type { LineStage } from '../contracts/spec.ts';

/** What tells two lines of different versions to be the same line. */
export interface MatchableLine {
  readonly id: string;
  readonly ingredientId: string;
  readonly stage: LineStage;
}

type IsSameLine = (one: MatchableLine, other: MatchableLine) => boolean;

/** From the surest to the least sure. The last is a line on which the ingredient was swapped. */
const WAYS_TO_MATCH: readonly IsSameLine[] = [
  (one, other) => one.id === other.id && one.ingredientId === other.ingredientId,
  (one, other) => one.ingredientId === other.ingredientId && one.stage === other.stage,
  (one, other) => one.ingredientId === other.ingredientId,
  (one, other) => one.id === other.id,
];

/**
 * Finds for each line the row it belongs to.
 *
 * @param input.rows    rows, each with the lines that are already in it
 * @param input.lines   lines of one version
 * @returns             for each line the number of its row; undefined for a line that is new. No row is used twice
 */
export function matchLines(input: {
  readonly rows: readonly (readonly MatchableLine[])[];
  readonly lines: readonly MatchableLine[];
}): (number | undefined)[] {
  const { rows, lines } = input;
  const rowOfLine: (number | undefined)[] = lines.map(() => undefined);
  const taken = new Set<number>();
  for (const isSame of WAYS_TO_MATCH) {
    lines.forEach((line, index) => {
      if (rowOfLine[index] !== undefined) return;
      const row = rows.findIndex(
        (members, at) => !taken.has(at) && members.some((member) => isSame(member, line)),
      );
      if (row < 0) return;
      taken.add(row);
      rowOfLine[index] = row;
    });
  }
  return rowOfLine;
}
