import type { Figures } from '../contracts/version.ts';

/** A place in the balance field: acid across, sugar up. */
export interface BalancePoint {
  readonly acidCitricGPerL: number;
  readonly sugarGPerL: number;
}

/** Where the field ends on its two axes [g/L]. */
export interface BalanceExtent {
  readonly maxAcidCitricGPerL: number;
  readonly maxSugarGPerL: number;
}

/** All points with the same sugar : acid lie on it, from the origin to where it leaves the field. */
export interface RatioRay {
  readonly ratio: number;
  readonly end: BalancePoint;
}

export function balancePoint(figures: Pick<Figures, 'acidCitricGPerL' | 'sugarGPerL'>): BalancePoint {
  return { acidCitricGPerL: figures.acidCitricGPerL, sugarGPerL: figures.sugarGPerL };
}

export function balanceExtent(_points: readonly BalancePoint[]): BalanceExtent {
  throw new Error('being written');
}

export function ratioRays(_input: {
  readonly extent: BalanceExtent;
  readonly ratios?: readonly number[];
}): RatioRay[] {
  throw new Error('being written');
}
