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

/** The field is never smaller: most shaken and stirred drinks lie in it. */
const SMALLEST_EXTENT: BalanceExtent = { maxAcidCitricGPerL: 10, maxSugarGPerL: 120 };
const ACID_STEP_G_PER_L = 2;
const SUGAR_STEP_G_PER_L = 20;
/** Room beyond the farthest point, so that its mark and label are not cut. */
const MARGIN = 1.08;

/** Sugar : acid of rays that are drawn unless others are asked for. */
export const DEFAULT_RATIOS = [4, 6, 8, 10, 12, 16] as const;

/** Where a drink lies in the balance field [g/L]. */
export function balancePoint(figures: Pick<Figures, 'acidCitricGPerL' | 'sugarGPerL'>): BalancePoint {
  return { acidCitricGPerL: figures.acidCitricGPerL, sugarGPerL: figures.sugarGPerL };
}

/** A field that holds all points, ending on whole steps of its axes [g/L]. */
export function balanceExtent(points: readonly BalancePoint[]): BalanceExtent {
  const acid = Math.max(0, ...points.map((point) => point.acidCitricGPerL));
  const sugar = Math.max(0, ...points.map((point) => point.sugarGPerL));
  return {
    maxAcidCitricGPerL: Math.max(
      SMALLEST_EXTENT.maxAcidCitricGPerL,
      Math.ceil((acid * MARGIN) / ACID_STEP_G_PER_L) * ACID_STEP_G_PER_L,
    ),
    maxSugarGPerL: Math.max(
      SMALLEST_EXTENT.maxSugarGPerL,
      Math.ceil((sugar * MARGIN) / SUGAR_STEP_G_PER_L) * SUGAR_STEP_G_PER_L,
    ),
  };
}

/**
 * Rays of equal sugar : acid, from the origin to the edge of the field.
 *
 * @param input.extent   where the field ends [g/L]
 * @param input.ratios   sugar ÷ acid, above 0
 */
export function ratioRays(input: {
  readonly extent: BalanceExtent;
  readonly ratios?: readonly number[];
}): RatioRay[] {
  const { maxAcidCitricGPerL, maxSugarGPerL } = input.extent;
  return (input.ratios ?? DEFAULT_RATIOS).map((ratio) => {
    const leavesAtTop = ratio * maxAcidCitricGPerL > maxSugarGPerL;
    const end = leavesAtTop
      ? { acidCitricGPerL: maxSugarGPerL / ratio, sugarGPerL: maxSugarGPerL }
      : { acidCitricGPerL: maxAcidCitricGPerL, sugarGPerL: ratio * maxAcidCitricGPerL };
    return { ratio, end };
  });
}
