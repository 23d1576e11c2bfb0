import { isStorableText } from './json-limits.ts';
import { problems } from './problems.ts';
import { isUuid } from './uuid.ts';

/** A place in a sorted list: the sort value of the last row shown, and its id. */
export interface Cursor {
  value: string | number;
  id: string;
}

/** Writes a cursor as text that a client hands back untouched. It names the sort, so that it fits no other. */
export function encodeCursor({ sort, value, id }: Cursor & { sort: string }): string {
  return Buffer.from(JSON.stringify([sort, value, id])).toString('base64url');
}

/** What the values of a sort are: a cursor of another kind is none of that list's. */
export type CursorKind = 'text' | 'number' | 'time';

/** Reads a cursor of this very list and sort; anything else is refused at its field. */
export function decodeCursor(
  text: string | undefined,
  sort: string,
  kind: CursorKind = 'text',
): Cursor | null {
  if (text === undefined) return null;
  const [cursorSort, value, id] = parsed(text);
  if (cursorSort !== sort || !isOfKind(value, kind) || typeof id !== 'string' || !isUuid(id)) {
    throw problems.invalidField('#/cursor', 'cursor', 'cursor is not one that this list and sort gave out.');
  }
  return { value, id };
}

/** Times are written as `toISOString` writes them, and only such a text gives itself back. */
function isOfKind(value: unknown, kind: CursorKind): value is string | number {
  if (kind === 'number') return typeof value === 'number' && Number.isFinite(value);
  if (typeof value !== 'string') return false;
  if (kind === 'text') return isStorableText(value);
  const time = new Date(value);
  return !Number.isNaN(time.getTime()) && time.toISOString() === value;
}

function parsed(text: string): unknown[] {
  try {
    const value: unknown = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
    return Array.isArray(value) ? value : [];
  } catch {
    return [];
  }
}

/** A search word as a LIKE pattern: what the person typed, anywhere, with the wildcards taken literally. */
export function containsPattern(search: string): string {
  return `%${search
    .trim()
    .toLowerCase()
    .replaceAll(/[\\%_]/g, '\\$&')}%`;
}
