import type { FieldError } from '../contracts/problem.ts';
import type { DraftBody } from '../contracts/spec.ts';
import type { SpecEvaluation } from './evaluate-spec.ts';

export type ScaledDraft =
  { readonly ok: true; readonly draft: DraftBody } | { readonly ok: false; readonly errors: FieldError[] };

export type ScaleFactor =
  | { readonly ok: true; readonly factor: number }
  | {
      readonly ok: false;
      readonly reason: 'nothing-computed' | 'incomplete' | 'out-of-range';
      readonly detail: string;
    };

export const SCALE_FACTOR_RANGE = { min: 0.001, max: 1000 } as const;

export function scaleDraft(_input: { readonly draft: DraftBody; readonly factor: number }): ScaledDraft {
  throw new Error('being written');
}

/** `of` says which volume is wanted: the finished drink (default) or the mix before ice and top. */
export function factorForTotalVolume(_input: {
  readonly evaluation: SpecEvaluation;
  readonly targetMl: number;
  readonly of?: 'finalMl' | 'undilutedMl';
}): ScaleFactor {
  throw new Error('being written');
}
