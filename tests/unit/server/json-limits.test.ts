import { describe, expect, it } from 'vitest';

import { JSON_LIMITS, refuseUnwieldy } from '#server/http/json-limits.ts';
import { ProblemError } from '#server/http/problems.ts';

function refusalOf(value: unknown): ProblemError | undefined {
  try {
    refuseUnwieldy(value);
    return undefined;
  } catch (error) {
    if (error instanceof ProblemError) return error;
    throw error;
  }
}

function nested(depth: number): unknown {
  return depth === 0 ? 1 : [nested(depth - 1)];
}

describe('limits of JSON', () => {
  it.each([[undefined], [null], [0], [''], [[]], [{}], ['ünïcode 🍋'], [{ a: [{ b: null }] }]])(
    'let %j pass',
    (value) => {
      expect(refusalOf(value)).toBeUndefined();
    },
  );

  it('let the deepest allowed value pass, and none deeper', () => {
    expect(refusalOf(nested(JSON_LIMITS.depth))).toBeUndefined();
    expect(refusalOf(nested(JSON_LIMITS.depth + 1))?.problemName).toBe('malformed-request');
  });

  it('let as many values pass as allowed, and none more', () => {
    const list = (length: number) => Array.from({ length }, () => 1);
    expect(refusalOf(list(JSON_LIMITS.values - 1))).toBeUndefined();
    expect(refusalOf(list(JSON_LIMITS.values))?.problemName).toBe('malformed-request');
  });

  it.each([
    [{ lines: [{ note: 'a' }, { note: 'b\0' }] }, '#/lines/1/note'],
    [{ 'a/b~c': '\ud83c' }, '#/a~1b~0c'],
    ['\udf4b', '#'],
    [{ ok: { 'bad\0key': 1 } }, '#/ok'],
  ])('name the text that no database holds in %j', (value, pointer) => {
    expect(refusalOf(value)?.extra.errors).toMatchObject([{ pointer, code: 'text' }]);
  });
});
