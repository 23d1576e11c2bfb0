import { type Amount, type AmountMeasure, measureOfAmount } from '../units/amount.ts';
import type { HouseMeasures } from '../units/house-measures.ts';

/** An amount with what its dashes and parts hold in the version it stands in. */
export interface AmountInVersion {
  readonly amount: Amount;
  readonly houseMeasures: HouseMeasures;
  readonly partMl: number;
}

export type AmountDifference =
  | { readonly direction: 'same' }
  | { readonly direction: 'more' | 'less'; readonly by: AmountMeasure }
  /** A volume against a mass, or pieces against either: no difference can be told without the ingredient. */
  | { readonly direction: 'unknown' };

/** Differences smaller than this share of the amount come from converting units, not from a hand. */
const RELATIVE_TOLERANCE = 1e-9;

/**
 * How much more or less the second amount is than the first, in whatever units each was written.
 *
 * `22.5 ml` against `0.75 oz` is 0.32 ml less: the ounce of the jigger is not 30 ml.
 */
export function amountDifference(input: {
  readonly before: AmountInVersion;
  readonly after: AmountInVersion;
}): AmountDifference {
  const before = measureOfAmount(input.before);
  const after = measureOfAmount(input.after);
  if (before.kind !== after.kind) return { direction: 'unknown' };
  const difference = sizeOf(after) - sizeOf(before);
  if (Math.abs(difference) <= RELATIVE_TOLERANCE * sizeOf(before)) return { direction: 'same' };
  return {
    direction: difference > 0 ? 'more' : 'less',
    by: measureOfSize({ kind: after.kind, size: Math.abs(difference) }),
  };
}

function sizeOf(measure: AmountMeasure): number {
  if (measure.kind === 'volume') return measure.volumeMl;
  return measure.kind === 'mass' ? measure.massG : measure.pieces;
}

function measureOfSize(input: { kind: AmountMeasure['kind']; size: number }): AmountMeasure {
  if (input.kind === 'volume') return { kind: 'volume', volumeMl: input.size };
  return input.kind === 'mass' ? { kind: 'mass', massG: input.size } : { kind: 'pieces', pieces: input.size };
}
