import { Type } from '@sinclair/typebox';
import { describe, expect, it } from 'vitest';

import type { FieldError } from '#shared/contracts/problem.ts';
import { lineOfText, nullable, oneOf } from '#shared/contracts/common.ts';

import { ProblemError } from '#server/http/problems.ts';
import { compileBodyCheck, compileTextCheck } from '#server/http/validation.ts';

const check = compileBodyCheck(
  Type.Object(
    {
      name: lineOfText({ maxLength: 5, description: 'name of the drink' }),
      kind: Type.Optional(oneOf(['shaken', 'stirred'])),
      massG: Type.Optional(Type.Number({ exclusiveMinimum: 0, maximum: 10, description: 'mass [g]' })),
      sugarGPerL: Type.Optional(Type.Number({ minimum: 1 })),
      email: Type.Optional(Type.String({ format: 'email' })),
      lines: Type.Optional(
        Type.Array(Type.Object({ massG: Type.Number() }, { additionalProperties: false }), {
          minItems: 1,
          maxItems: 2,
        }),
      ),
      choice: Type.Optional(nullable(Type.String())),
    },
    { $id: 'Trial', additionalProperties: false },
  ),
);

function errorsOf(value: unknown, checker: (value: unknown) => void = check): FieldError[] {
  try {
    checker(value);
    return [];
  } catch (error) {
    if (error instanceof ProblemError) return error.extra.errors ?? [];
    throw error;
  }
}

describe('the check of a body', () => {
  it('lets a right one pass', () => {
    expect(errorsOf({ name: 'Sour', kind: 'shaken', lines: [{ massG: 1 }], choice: null })).toEqual([]);
  });

  it.each([
    [{}, '#/name', 'required', 'name is missing.'],
    [{ name: '' }, '#/name', 'minLength', 'name (name of the drink) is empty.'],
    [{ name: 'Sourest' }, '#/name', 'maxLength', 'name (name of the drink) has more than 5 characters.'],
    [{ name: 'S', kind: 'blown' }, '#/kind', 'enum', 'kind is “blown”; allowed are shaken, stirred.'],
    [
      { name: 'S', massG: 0 },
      '#/massG',
      'exclusiveMinimum',
      'massG (mass [g]) is 0; it must be more than 0.',
    ],
    [{ name: 'S', massG: 11 }, '#/massG', 'maximum', 'massG (mass [g]) is 11; it must be at most 10.'],
    [{ name: 'S', sugarGPerL: 0 }, '#/sugarGPerL', 'minimum', 'sugarGPerL is 0; it must be at least 1.'],
    [{ name: 'S', massG: '3' }, '#/massG', 'type', 'massG (mass [g]) is “3”; it must be a number.'],
    [{ name: 'S', email: 'me' }, '#/email', 'format', 'email is “me”, which is not a valid email.'],
    [{ name: 'S', lines: [] }, '#/lines', 'minItems', 'lines needs at least 1.'],
    [
      { name: 'S', lines: [{ massG: 1 }, {}] },
      '#/lines/1/massG',
      'required',
      'lines no. 2 massG is missing.',
    ],
    [{ name: 'S', extra: 1 }, '#/extra', 'additionalProperties', 'extra is not a known field.'],
  ])('says of %j what is wrong and where', (value, pointer, code, detail) => {
    expect(errorsOf(value)).toEqual([{ pointer, code, detail }]);
  });

  it('gives one sentence for each field, and no more than fifty', () => {
    const many = Object.fromEntries(Array.from({ length: 200 }, (_, n) => [`field${n}`, n]));
    const errors = errorsOf({ name: 'S', ...many });
    expect(errors).toHaveLength(50);
    expect(new Set(errors.map(({ pointer }) => pointer)).size).toBe(50);
  });

  it('repeats no more of a value than helps', () => {
    const [error] = errorsOf({ name: 'S', kind: 'x'.repeat(10_000) });
    expect(error?.detail.length).toBeLessThan(140);
  });
});

describe('the check of a query', () => {
  const checkQuery = compileTextCheck(
    Type.Object({ limit: Type.Optional(Type.Integer({ maximum: 9 })) }, { additionalProperties: false }),
  );

  it('reads a number in place', () => {
    const query = { limit: '7' };
    checkQuery(query);
    expect(query).toEqual({ limit: 7 });
  });

  it.each([['seven'], [''], ['7.5'], ['10'], [['1', '2']]])('refuses %j', (limit) => {
    expect(errorsOf({ limit }, checkQuery)).toMatchObject([{ pointer: '#/limit' }]);
  });
});
