/**
 * A draft on this device, written with every change, so that a reload, a crash or a lost connection loses nothing. One entry for
 * each person and spec.
 */
import type { DraftBody } from '#shared/contracts/spec.ts';

export interface JournalEntry {
  readonly draft: DraftBody;
  /** Revision of the server's draft that this one was made from. */
  readonly baseRevision: number;
  /** When it was written, RFC 3339. */
  readonly writtenAt: string;
}

export type JournalStorage = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

export interface DraftJournal {
  /** null when there is none, or none that can be read. */
  read: () => JournalEntry | null;
  /** Whether it was kept: storage may be full or switched off. */
  write: (entry: JournalEntry) => boolean;
  clear: () => void;
}

export function journalKey(input: { userId: string; specId: string }): string {
  return `oxymel.draft.${input.userId}.${input.specId}`;
}

export function draftJournal(input: {
  userId: string;
  specId: string;
  /** The browser's, asked for only when needed: reading it can throw already. */
  storage: () => JournalStorage;
}): DraftJournal {
  const key = journalKey(input);
  return {
    read: () => attempt(() => entryFrom(input.storage().getItem(key))) ?? null,
    write: (entry) =>
      attempt(() => {
        input.storage().setItem(key, JSON.stringify(entry));
        return true;
      }) ?? false,
    clear: () => void attempt(() => input.storage().removeItem(key)),
  };
}

function attempt<Result>(run: () => Result): Result | undefined {
  try {
    return run();
  } catch {
    return undefined;
  }
}

/** Whatever is stored may be from another release, or from anybody: only what has the shape of a draft is taken. */
function entryFrom(text: string | null): JournalEntry | null {
  if (text === null) return null;
  const entry: unknown = JSON.parse(text);
  if (!isRecord(entry) || !isRecord(entry['draft'])) return null;
  const { draft, baseRevision, writtenAt } = entry;
  const hasShape =
    typeof baseRevision === 'number' &&
    typeof writtenAt === 'string' &&
    Array.isArray(draft['lines']) &&
    draft['lines'].every(isLine) &&
    Array.isArray(draft['build']) &&
    draft['build'].every((step) => typeof step === 'string') &&
    isRecord(draft['dilution']) &&
    isRecord(draft['glassIce']) &&
    typeof draft['method'] === 'string' &&
    typeof draft['ice'] === 'string' &&
    typeof draft['garnish'] === 'string' &&
    typeof draft['partMl'] === 'number';
  return hasShape ? (entry as unknown as JournalEntry) : null;
}

function isLine(line: unknown): boolean {
  return (
    isRecord(line) &&
    typeof line['id'] === 'string' &&
    (line['ingredientId'] === null || typeof line['ingredientId'] === 'string') &&
    typeof line['amountText'] === 'string' &&
    typeof line['note'] === 'string' &&
    (line['stage'] === 'mix' || line['stage'] === 'top')
  );
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
