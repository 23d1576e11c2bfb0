import { type ComputedRef, type Ref, computed, ref } from 'vue';

import type { Glass, GlassSnapshot } from '#shared/contracts/glass.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import type { DraftBody, DraftLine, Spec } from '#shared/contracts/spec.ts';
import type { Figures, IngredientSnapshot } from '#shared/contracts/version.ts';
import { completeDraft } from '#shared/specs/complete-draft.ts';
import { type EvaluatedLine, type SpecEvaluation, evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import type { AmountUnit } from '#shared/units/amount.ts';
import type { HouseMeasures } from '#shared/units/house-measures.ts';
import { saveDraft } from '#src/api/specs.ts';
import {
  blankLine,
  canAddLines,
  changeLine,
  changeStep,
  insertLines,
  insertStep,
  moveLine,
  moveStep,
  removeLine,
  removeStep,
} from './draft-edits.ts';
import { draftJournal } from './draft-journal.ts';
import { type PastableIngredient, linesFromText } from './paste-lines.ts';
import { type DraftSaving, useDraftSaving } from './useDraftSaving.ts';
import { type History, useHistory } from './useHistory.ts';

export interface SpecEditorOptions {
  teamId: string;
  userId: string;
  spec: Spec;
  snapshots: Readonly<Ref<ReadonlyMap<string, IngredientSnapshot>>>;
  glasses: Readonly<Ref<readonly Glass[]>>;
  houseMeasures: Readonly<Ref<HouseMeasures>>;
  /** What a number alone means to this person. */
  defaultUnit: Readonly<Ref<AmountUnit>>;
}

/** Everything of a draft but its lines and steps. */
export type Making = Omit<DraftBody, 'lines' | 'build'>;

export interface SpecEditor {
  draft: Readonly<Ref<DraftBody>>;
  glass: ComputedRef<GlassSnapshot | null>;
  evaluation: ComputedRef<SpecEvaluation>;
  figures: ComputedRef<Figures | null>;
  lineOf: (lineId: string) => EvaluatedLine | null;
  history: History<DraftBody>;
  saving: DraftSaving;
  /** Whether what is on the page came from the journal of this device. */
  isRestored: boolean;
  /** What stands in the way of a version, once one was to be saved. */
  errors: ComputedRef<readonly FieldError[]>;
  /** Shows the errors from now on; true when there are none. */
  check: () => boolean;
  change: (part: Partial<Making>, key?: string) => void;
  replace: (draft: DraftBody) => void;
  setLine: (lineId: string, part: Partial<Omit<DraftLine, 'id'>>) => void;
  removeLine: (lineId: string) => { line: DraftLine; index: number } | null;
  putBack: (removed: { line: DraftLine; index: number }) => void;
  moveLine: (from: number, to: number) => void;
  /** Reads a recipe into lines from a place on; the number of lines it made. */
  paste: (input: { text: string; index: number; items: readonly PastableIngredient[] }) => number;
  setStep: (index: number, text: string) => void;
  addStep: (index: number) => void;
  removeStep: (index: number) => void;
  moveStep: (from: number, to: number) => void;
}

/** A spec's draft on the bench: its changes with undo, its figures as one types, and where it is kept. */
export function useSpecEditor(options: SpecEditorOptions): SpecEditor {
  const { teamId, userId, spec } = options;
  const journal = draftJournal({ userId, specId: spec.id, storage: () => localStorage });
  const restored = journal.read();
  const history = useHistory<DraftBody>(restored?.draft ?? spec.draft);
  const draft = history.present;
  const saving = useDraftSaving({
    spec,
    draft,
    journal,
    restored,
    send: (based, body) => saveDraft(teamId, based, body),
  });
  const isRestored = restored !== null && saving.status.value !== 'saved';

  const glass = computed(() => glassSnapshot(options.glasses.value, draft.value.glassId));
  const evaluation = computed(() =>
    evaluateSpec({
      body: draft.value,
      ingredients: options.snapshots.value,
      glass: glass.value,
      houseMeasures: options.houseMeasures.value,
    }),
  );
  const linesById = computed(() => new Map(evaluation.value.lines.map((line) => [line.lineId, line])));

  const isChecked = ref(false);
  const errors = computed(() => (isChecked.value ? errorsOf(draft.value) : []));

  return {
    draft,
    glass,
    evaluation,
    figures: computed(() => evaluation.value.figures),
    lineOf: (lineId) => linesById.value.get(lineId) ?? null,
    history,
    saving,
    isRestored,
    errors,
    check: () => {
      isChecked.value = true;
      return errors.value.length === 0;
    },
    change: (part, key) => history.commit({ ...draft.value, ...part }, key),
    replace: (next) => history.commit(next),
    ...lineEdits({ history, defaultUnit: options.defaultUnit }),
    setStep: (index, text) => history.commit(changeStep(draft.value, index, text), `step-${index}`),
    addStep: (index) => history.commit(insertStep(draft.value, index)),
    removeStep: (index) => history.commit(removeStep(draft.value, index)),
    moveStep: (from, to) => history.commit(moveStep(draft.value, from, to), 'move-step'),
  };
}

type LineEdits = Pick<SpecEditor, 'setLine' | 'removeLine' | 'putBack' | 'moveLine' | 'paste'>;

function lineEdits(input: {
  history: History<DraftBody>;
  defaultUnit: Readonly<Ref<AmountUnit>>;
}): LineEdits {
  const { history } = input;
  const draft = history.present;
  return {
    setLine: (lineId, part) => {
      const key = `line-${lineId}-${Object.keys(part).join('-')}`;
      const isThere = draft.value.lines.some((line) => line.id === lineId);
      if (isThere) history.commit(changeLine(draft.value, lineId, part), key);
      else if (canAddLines(draft.value)) {
        const line = { ...blankLine(), id: lineId, ...part };
        history.commit(insertLines(draft.value, draft.value.lines.length, [line]), key);
      }
    },
    removeLine: (lineId) => {
      const index = draft.value.lines.findIndex((line) => line.id === lineId);
      const line = draft.value.lines[index];
      if (line === undefined) return null;
      history.commit(removeLine(draft.value, lineId));
      return { line, index };
    },
    putBack: ({ line, index }) => history.commit(insertLines(draft.value, index, [line])),
    moveLine: (from, to) => history.commit(moveLine(draft.value, from, to), 'move-line'),
    paste: ({ text, index, items }) => {
      const pasted = linesFromText({ text, items, defaultUnit: input.defaultUnit.value });
      const lines = pasted.map((line) => blankLine(line));
      const next = insertLines(draft.value, index, lines);
      const count = next.lines.length - draft.value.lines.length;
      history.commit(next);
      return count;
    },
  };
}

function errorsOf(draft: DraftBody): readonly FieldError[] {
  const completed = completeDraft(draft);
  return completed.ok ? [] : completed.errors;
}

function glassSnapshot(glasses: readonly Glass[], glassId: string | null): GlassSnapshot | null {
  const glass = glasses.find(({ id }) => id === glassId);
  if (glass === undefined) return null;
  const { id, name, profile, stemMm, brimMl } = glass;
  return { id, name, profile, stemMm, brimMl };
}
