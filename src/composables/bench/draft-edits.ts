/** Changes of a draft, each as a function from draft to draft: nothing is changed in place. */
import { type DraftBody, type DraftLine, SPEC_LIMITS } from '#shared/contracts/spec.ts';
import { newId } from './new-id.ts';

export function blankLine(part: Partial<DraftLine> = {}): DraftLine {
  return { id: newId(), ingredientId: null, amountText: '', stage: 'mix', note: '', ...part };
}

export function canAddLines(draft: DraftBody, count = 1): boolean {
  return draft.lines.length + count <= SPEC_LIMITS.lines;
}

export function changeLine(
  draft: DraftBody,
  lineId: string,
  part: Partial<Omit<DraftLine, 'id'>>,
): DraftBody {
  return {
    ...draft,
    lines: draft.lines.map((line) => (line.id === lineId ? { ...line, ...part } : line)),
  };
}

/** Puts lines in at a place; those beyond the limit of a spec are left out. */
export function insertLines(draft: DraftBody, index: number, lines: readonly DraftLine[]): DraftBody {
  const room = Math.max(0, SPEC_LIMITS.lines - draft.lines.length);
  return { ...draft, lines: draft.lines.toSpliced(index, 0, ...lines.slice(0, room)) };
}

export function removeLine(draft: DraftBody, lineId: string): DraftBody {
  return { ...draft, lines: draft.lines.filter((line) => line.id !== lineId) };
}

/** Moves the line at a place to another; the draft itself when it is there already or there is no such place. */
export function moveLine(draft: DraftBody, from: number, to: number): DraftBody {
  const lines = movedTo(draft.lines, from, to);
  return lines === draft.lines ? draft : { ...draft, lines: [...lines] };
}

export function moveStep(draft: DraftBody, from: number, to: number): DraftBody {
  const build = movedTo(draft.build, from, to);
  return build === draft.build ? draft : { ...draft, build: [...build] };
}

function movedTo<Item>(items: readonly Item[], from: number, to: number): readonly Item[] {
  const item = items[from];
  if (from === to || item === undefined || to < 0 || to >= items.length) return items;
  return items.toSpliced(from, 1).toSpliced(to, 0, item);
}

export function changeStep(draft: DraftBody, index: number, text: string): DraftBody {
  return { ...draft, build: draft.build.map((step, at) => (at === index ? text : step)) };
}

export function insertStep(draft: DraftBody, index: number): DraftBody {
  if (draft.build.length >= SPEC_LIMITS.buildSteps) return draft;
  return { ...draft, build: draft.build.toSpliced(index, 0, '') };
}

export function removeStep(draft: DraftBody, index: number): DraftBody {
  return { ...draft, build: draft.build.toSpliced(index, 1) };
}

/** Whether two drafts say the same, in whatever order their members were written. */
export function isSameDraft(one: DraftBody, other: DraftBody): boolean {
  return one === other || canonical(one) === canonical(other);
}

function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, member: unknown) =>
    typeof member === 'object' && member !== null && !Array.isArray(member)
      ? Object.fromEntries(Object.entries(member).sort(([a], [b]) => (a < b ? -1 : 1)))
      : member,
  );
}
