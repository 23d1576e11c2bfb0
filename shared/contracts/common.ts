import { type Static, type TSchema, Type } from '@sinclair/typebox';

/** Building blocks that every contract uses. Schemas are JSON Schema 2020-12. */

export const Uuid = Type.String({ format: 'uuid', description: 'UUID' });

export const Timestamp = Type.String({ format: 'date-time', description: 'RFC 3339 date and time in UTC' });

/** A calendar day without a time, such as the day a price was noted. */
export const CalendarDate = Type.String({ format: 'date', description: 'RFC 3339 full-date' });

/** Text of one line: no control characters, at least one character that is not a space. */
export function lineOfText(input: { maxLength: number; description: string }) {
  return Type.String({
    minLength: 1,
    maxLength: input.maxLength,
    pattern: '^[^\\u0000-\\u001f\\u007f]*[^\\s\\u0000-\\u001f\\u007f][^\\u0000-\\u001f\\u007f]*$',
    description: input.description,
  });
}

/** Text of several lines, possibly empty. Tab and line breaks are the only control characters allowed. */
export function longText(input: { maxLength: number; description: string }) {
  return Type.String({
    maxLength: input.maxLength,
    pattern: '^[^\\u0000-\\u0008\\u000b\\u000c\\u000e-\\u001f\\u007f]*$',
    description: input.description,
  });
}

/** A closed set of words, as one JSON Schema `enum`. */
export function oneOf<const Words extends readonly string[]>(
  words: Words,
  options: Record<string, unknown> = {},
) {
  return Type.Unsafe<Words[number]>({ type: 'string', enum: [...words], ...options });
}

/** `T` or null, written so that Ajv's strict mode accepts it. */
export function nullable<S extends TSchema>(schema: S) {
  return Type.Union([schema, Type.Null()]);
}

export const PAGE_LIMIT = { min: 1, max: 200, default: 50 } as const;

/** Query members shared by every keyset-paginated list. */
export const pageQueryMembers = {
  cursor: Type.Optional(Type.String({ maxLength: 500, description: 'nextCursor of the page before' })),
  limit: Type.Optional(
    Type.Integer({ minimum: PAGE_LIMIT.min, maximum: PAGE_LIMIT.max, description: 'rows in the page' }),
  ),
};

/** A page of a list. `nextCursor` is null on the last page. */
export function pageOf<S extends TSchema>(itemSchema: S, options: { $id: string }) {
  return Type.Object(
    { items: Type.Array(itemSchema), nextCursor: nullable(Type.String()) },
    { $id: options.$id, additionalProperties: false },
  );
}

export interface Page<Item> {
  items: Item[];
  nextCursor: string | null;
}

/** Every edit of an existing resource names the revision it was based on, as `If-Match: "<revision>"`. */
export const Revision = Type.Integer({
  minimum: 1,
  description: 'revision, raised by one with every change',
});

export const PersonRefSchema = Type.Object(
  { id: Uuid, name: Type.String() },
  { additionalProperties: false, description: 'a person as other people of the team see them' },
);
export type PersonRef = Static<typeof PersonRefSchema>;
