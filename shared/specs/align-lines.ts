import type { SpecLine } from '../contracts/spec.ts';
import type { IngredientSnapshot, Version } from '../contracts/version.ts';
import { matchLines } from './match-lines.ts';

export interface AlignedCell {
  readonly line: SpecLine;
  /** null when the version does not carry the ingredient. */
  readonly ingredient: IngredientSnapshot | null;
  /** Place among the lines of its version, from 0. */
  readonly position: number;
}

export interface AlignedLine {
  /** Stable within one call: the id of the first line in the row. */
  readonly key: string;
  /** Name of the first ingredient in the row. */
  readonly name: string;
  /** One cell a version, in the order given; null where the version has no such line. */
  readonly cells: readonly (AlignedCell | null)[];
  /** Whether the row says the same in every version: ingredient, amount, stage and note. */
  readonly isSame: boolean;
}

/** Cells by version; a version that has no such line leaves a gap. */
type Row = Map<number, AlignedCell>;

/**
 * Puts the lines of several versions side by side: the same ingredient, or the same line with its ingredient swapped, in one
 * row.
 *
 * Rows keep the order of the first version; a line that another adds follows the one it follows there.
 * @param versions   the versions to compare, in the order of the columns
 */
export function alignLines(versions: readonly Pick<Version, 'body' | 'ingredients'>[]): AlignedLine[] {
  const rows: Row[] = [];
  versions.forEach((version, column) => placeVersion({ version, column, rows }));
  return rows.map((row) => alignedLine({ row, columns: versions.length }));
}

function placeVersion(input: {
  readonly version: Pick<Version, 'body' | 'ingredients'>;
  readonly column: number;
  readonly rows: Row[];
}): void {
  const { version, column, rows } = input;
  const ingredients = new Map(version.ingredients.map((ingredient) => [ingredient.id, ingredient]));
  const members = rows.map((row) => [...row.values()].map((cell) => cell.line));
  const matches = matchLines({ rows: members, lines: version.body.lines });
  const rowOfMatch = matches.map((match) => (match === undefined ? undefined : rows[match]));
  let previous: Row | undefined;
  version.body.lines.forEach((line, position) => {
    const row: Row = rowOfMatch[position] ?? new Map<number, AlignedCell>();
    row.set(column, { line, ingredient: ingredients.get(line.ingredientId) ?? null, position });
    if (rowOfMatch[position] === undefined) {
      rows.splice(previous === undefined ? 0 : rows.indexOf(previous) + 1, 0, row);
    }
    previous = row;
  });
}

function alignedLine(input: { readonly row: Row; readonly columns: number }): AlignedLine {
  const { row, columns } = input;
  const cells = Array.from({ length: columns }, (_, column) => row.get(column) ?? null);
  const [first, ...others] = [...row.values()];
  return {
    key: first?.line.id ?? '',
    name: first?.ingredient?.name ?? '',
    cells,
    isSame:
      row.size === columns &&
      first !== undefined &&
      others.every((cell) => isSameLine(cell.line, first.line)),
  };
}

function isSameLine(one: SpecLine, other: SpecLine): boolean {
  return (
    one.ingredientId === other.ingredientId &&
    one.amount.value === other.amount.value &&
    one.amount.unit === other.amount.unit &&
    one.stage === other.stage &&
    one.note === other.note
  );
}
