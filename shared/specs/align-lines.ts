import type { SpecLine } from '../contracts/spec.ts';
import type { IngredientSnapshot, Version } from '../contracts/version.ts';

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

export function alignLines(_versions: readonly Pick<Version, 'body' | 'ingredients'>[]): AlignedLine[] {
  throw new Error('being written');
}
