import type { Version } from '../contracts/version.ts';

/** One side of a comparison; a version is one as it stands. */
export type DescribedSide = Pick<Version, 'body' | 'ingredients' | 'glass' | 'figures'>;

export function describeChanges(_input: {
  readonly before: DescribedSide;
  readonly after: DescribedSide;
}): string[] {
  throw new Error('being written');
}
