import { problems } from './problems.ts';

/** Far more than any body of ours has; a longer one is refused before the checks spend time on it. */
export const JSON_LIMITS = { values: 20_000, depth: 40 } as const;

/** NUL, which PostgreSQL cannot store, and halves of characters, which are no text at all. */
const UNSTORABLE = /\0|\p{Surrogate}/u;

/** Whether PostgreSQL can hold the text. */
export function isStorableText(text: string): boolean {
  return !UNSTORABLE.test(text);
}

interface Visit {
  value: unknown;
  pointer: string;
  depth: number;
}

/** Refuses values that are nested or numerous beyond reason, or that hold text no database takes. */
export function refuseUnwieldy(root: unknown): void {
  const waiting: Visit[] = [{ value: root, pointer: '#', depth: 0 }];
  let seen = 0;
  for (let visit = waiting.pop(); visit !== undefined; visit = waiting.pop()) {
    const { value, pointer, depth } = visit;
    seen += 1;
    if (seen + waiting.length > JSON_LIMITS.values) {
      throw problems.malformedRequest(`The body has more than ${JSON_LIMITS.values} values.`);
    }
    if (depth > JSON_LIMITS.depth) {
      throw problems.malformedRequest(`The body is nested more than ${JSON_LIMITS.depth} levels deep.`);
    }
    if (typeof value === 'string') refuseUnstorable(value, pointer);
    if (typeof value !== 'object' || value === null) continue;
    for (const [key, member] of Object.entries(value)) {
      refuseUnstorable(key, pointer);
      waiting.push({ value: member, pointer: `${pointer}/${escapePointer(key)}`, depth: depth + 1 });
    }
  }
}

/** A member's name as it stands in a JSON Pointer. */
export function escapePointer(name: string): string {
  return name.replaceAll('~', '~0').replaceAll('/', '~1');
}

function refuseUnstorable(text: string, pointer: string): void {
  if (isStorableText(text)) return;
  throw problems.invalidField(pointer, 'text', 'There is a character here that is no text, such as NUL.');
}
