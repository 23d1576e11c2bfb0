import { type ComputedRef, type Ref, computed } from 'vue';

import type { Version } from '#shared/contracts/version.ts';
import { pourToleranceMl } from '#shared/specs/pour-tolerance.ts';
import type {
  FieldGhost,
  FieldLive,
  FieldReference,
  FieldVersion,
} from '#src/components/drawing/field-marks.ts';
import { ghostPoint, livePoint, publishedPoints, versionPoints } from './field-points.ts';
import { linesLeftOut } from './line-words.ts';
import type { Comparing } from './useComparedWith.ts';
import type { SpecEditor } from './useSpecEditor.ts';

export interface BenchPicture {
  references: ComputedRef<FieldReference[]>;
  trail: ComputedRef<FieldVersion[]>;
  live: ComputedRef<FieldLive | null>;
  ghost: ComputedRef<FieldGhost | null>;
  /** How far the pours may be off by law [mL]. */
  toleranceMl: ComputedRef<number | null>;
  /** Lines that are begun and not in the figures, by name. */
  leftOut: ComputedRef<string[]>;
}

/** What the glass and the field show of the draft. */
export function useBenchPicture(input: {
  editor: SpecEditor;
  versions: Readonly<Ref<readonly Version[]>>;
  comparing: Comparing;
  nameOf: (ingredientId: string) => string | null;
}): BenchPicture {
  const { draft, evaluation, figures } = input.editor;
  const { chosenKey, comparedWith } = input.comparing;
  return {
    references: computed(() => publishedPoints(chosenKey.value)),
    trail: computed(() => versionPoints(input.versions.value)),
    live: computed(() => livePoint(figures.value)),
    ghost: computed(() => ghostPoint(comparedWith.value)),
    toleranceMl: computed(() => pourToleranceMl({ body: draft.value, evaluation: evaluation.value })),
    leftOut: computed(() =>
      linesLeftOut({ draft: draft.value, evaluation: evaluation.value, nameOf: input.nameOf }),
    ),
  };
}
