/** A value that was computed all the same, and why to look at it twice. It travels with the figures. */
export interface CalculationWarning {
  readonly code:
    'extrapolated' | 'no-published-curve' | 'lighter-than-composition' | 'overflows' | 'mass-lost';
  /** Which quantity, named as in the code. */
  readonly quantity: string;
  readonly value: number | null;
  readonly min: number | null;
  readonly max: number | null;
  /** One sentence for a person. */
  readonly detail: string;
}
