import { useEventListener } from '@vueuse/core';
import { type Ref, type ShallowRef, computed, onScopeDispose, ref, shallowRef, watch } from 'vue';

import type { DraftBody, Spec } from '#shared/contracts/spec.ts';
import { ApiProblem, NoAnswerError } from '#src/api/http.ts';
import { isSameDraft } from './draft-edits.ts';
import type { DraftJournal, JournalEntry } from './draft-journal.ts';

export type SaveStatus =
  | 'saved'
  /** Changed, and about to be sent. */
  | 'waiting'
  | 'saving'
  /** Not on the server, and safe in the journal of this device. */
  | 'kept'
  /** Not on the server, and not on this device either. */
  | 'not-kept'
  /** Somebody else saved the draft meanwhile: both states wait for a choice. */
  | 'conflict'
  /** The server will not take it; `failure` says why. It is in the journal. */
  | 'refused';

export interface DraftSavingOptions {
  spec: Spec;
  draft: Readonly<Ref<DraftBody>>;
  journal: DraftJournal;
  /** What the journal held when the page was opened, which `draft` begins with; null when nothing. */
  restored?: JournalEntry | null;
  send: (based: Pick<Spec, 'id' | 'draftRevision'>, draft: DraftBody) => Promise<Spec>;
  /** Rest after the last change before it is sent [ms]; default 800. */
  debounceMs?: number;
  /** First pause before it is tried again [ms], doubled up to a minute; default 4000. */
  retryMs?: number;
}

export interface DraftSaving {
  status: Readonly<Ref<SaveStatus>>;
  failure: Readonly<ShallowRef<unknown>>;
  /** The spec as the server has it, as far as is known here. */
  server: Readonly<ShallowRef<Spec>>;
  /** What somebody else saved, during a conflict. */
  theirs: Readonly<ShallowRef<Spec | null>>;
  /** Sends what is not sent yet; true when the server has the draft as it is here. */
  flush: () => Promise<boolean>;
  /** Ends a conflict: from now on the draft here follows theirs. */
  settle: () => void;
  /** The draft of the server was replaced by something else that was done there, such as a saved version. */
  adopt: (spec: Spec) => void;
  /** A stale answer to another request of this page, such as saving a version. */
  contest: (current: Spec) => void;
}

const DEFAULT_DEBOUNCE_MS = 800;
const DEFAULT_RETRY_MS = 4000;
const LONGEST_RETRY_MS = 60_000;
const SERVER_FAULT = 500;

/** Keeps a draft: in the journal with every change, on the server shortly after. One request at a time. */
export function useDraftSaving(options: DraftSavingOptions): DraftSaving {
  const { draft, journal, debounceMs = DEFAULT_DEBOUNCE_MS, retryMs = DEFAULT_RETRY_MS } = options;
  const server = shallowRef(options.spec);
  const theirs = shallowRef<Spec | null>(null);
  const failure = shallowRef<unknown>(null);
  const status = ref<SaveStatus>('saved');
  /** The draft that the server has, as it was sent: its answer may write the same otherwise. */
  let savedDraft = options.spec.draft;
  /** Revision that the draft here was made from; during a conflict it is older than theirs. */
  let baseRevision = options.restored?.baseRevision ?? options.spec.draftRevision;
  let inFlight: Promise<void> | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let retryPauseMs = retryMs;
  let isKept = true;

  const isClean = (): boolean => isSameDraft(draft.value, savedDraft);

  function keep() {
    isKept = journal.write({ draft: draft.value, baseRevision, writtenAt: new Date().toISOString() });
  }

  function rest(pauseMs: number) {
    clearTimeout(timer);
    timer = setTimeout(() => void save(), pauseMs);
  }

  function onChange() {
    if (theirs.value !== null) {
      keep();
      return;
    }
    if (isClean() && inFlight === null) {
      settleAsSaved();
      return;
    }
    keep();
    if (status.value !== 'saving') status.value = isKept ? 'waiting' : 'not-kept';
    rest(debounceMs);
  }

  function settleAsSaved() {
    clearTimeout(timer);
    journal.clear();
    failure.value = null;
    status.value = 'saved';
    retryPauseMs = retryMs;
  }

  function save(): Promise<void> {
    clearTimeout(timer);
    inFlight ??= sendOnce().finally(() => (inFlight = null));
    return inFlight;
  }

  async function sendOnce() {
    if (theirs.value !== null) return;
    if (isClean()) {
      settleAsSaved();
      return;
    }
    const sent = draft.value;
    status.value = 'saving';
    try {
      onAnswer(await options.send(server.value, sent), sent);
    } catch (error) {
      onFailure(error, sent);
    }
  }

  function onAnswer(answer: Spec, sent: DraftBody) {
    server.value = answer;
    baseRevision = answer.draftRevision;
    savedDraft = sent;
    failure.value = null;
    if (isClean()) {
      settleAsSaved();
      return;
    }
    keep();
    status.value = 'waiting';
    rest(debounceMs);
  }

  function onFailure(error: unknown, sent: DraftBody) {
    if (error instanceof ApiProblem && error.is('stale-version') && error.problem.current !== undefined) {
      const current = error.problem.current as Spec;
      // The answer to an earlier save was lost on its way: it had arrived all the same.
      if (isSameDraft(current.draft, sent)) onAnswer(current, sent);
      else contest(current);
      return;
    }
    const mayWorkLater =
      error instanceof NoAnswerError ||
      (error instanceof ApiProblem &&
        (error.problem.status >= SERVER_FAULT || error.is('too-many-requests')));
    failure.value = error;
    if (!mayWorkLater) {
      status.value = 'refused';
      return;
    }
    status.value = isKept ? 'kept' : 'not-kept';
    rest(retryPauseMs);
    retryPauseMs = Math.min(2 * retryPauseMs, LONGEST_RETRY_MS);
  }

  function contest(current: Spec) {
    clearTimeout(timer);
    theirs.value = current;
    keep();
    status.value = 'conflict';
  }

  function adopt(spec: Spec) {
    server.value = spec;
    baseRevision = spec.draftRevision;
    savedDraft = spec.draft;
    theirs.value = null;
    onChange();
  }

  function settle() {
    if (theirs.value !== null) adopt(theirs.value);
  }

  async function flush(): Promise<boolean> {
    while (theirs.value === null && !isClean()) {
      await save();
      if (status.value !== 'saved' && status.value !== 'waiting') return false;
    }
    return theirs.value === null;
  }

  /** A draft from the journal goes on where it was left, unless somebody saved another meanwhile. */
  function goOn() {
    if (isClean()) settleAsSaved();
    else if (baseRevision === options.spec.draftRevision) onChange();
    else contest(options.spec);
  }

  watch(draft, onChange, { flush: 'sync' });
  if (options.restored !== undefined && options.restored !== null) goOn();
  useEventListener(window, 'online', () => {
    if (status.value === 'kept' || status.value === 'not-kept') void save();
  });
  useEventListener(document, 'visibilitychange', () => {
    if (document.visibilityState === 'hidden' && status.value === 'waiting') void save();
  });
  onScopeDispose(() => {
    clearTimeout(timer);
    if (status.value === 'waiting' || status.value === 'kept') void save();
  });

  return {
    status: computed(() => status.value),
    failure,
    server,
    theirs,
    flush,
    settle,
    adopt,
    contest,
  };
}
