import { describe, expect, it } from 'vitest';

import { parseNumber } from '#shared/text/parse-number.ts';

describe('a number typed into a field', () => {
  it.each([
    ['22.5', 22.5],
    ['22,5', 22.5],
    [' 40 ', 40],
    ['.5', 0.5],
    [',5', 0.5],
    ['5.', 5],
    ['-3', -3],
    ['−3', -3],
    ['+2', 2],
    ['-0', 0],
    ['1.000', 1],
    ['0,125', 0.125],
    ['４０', 40],
    ['40\u00a0', 40],
  ])('%j is %d', (text, value) => {
    expect(parseNumber(text)).toStrictEqual({ ok: true, value });
  });

  it.each([
    ['', 'empty', 'Write a number'],
    ['  ', 'empty', 'Write a number'],
    ['abc', 'unreadable', '“abc” is not a number'],
    ['40%', 'unreadable', '“40%” is not a number'],
    ['1e3', 'unreadable', '“1e3” is not a number'],
    ['--3', 'unreadable', 'is not a number'],
    ['1/2', 'unreadable', 'is not a number'],
    ['Infinity', 'unreadable', 'is not a number'],
    ['.', 'unreadable', 'is not a number'],
    ['9'.repeat(400), 'unreadable', 'This is not a number'],
    ['1,150', 'ambiguous', '1150 or 1.150'],
    ['1,000.5', 'ambiguous', 'without one, such as 1000.5'],
    ['1.000,5', 'ambiguous', 'without one, such as 1000.5'],
    ['1.2.3', 'ambiguous', 'without one, such as 1000.5'],
  ])('%j is refused as %s with a sentence', (text, reason, words) => {
    const result = parseNumber(text);
    expect(result).toMatchObject({ ok: false, reason });
    expect(result.ok ? '' : result.detail).toContain(words);
  });

  it('names the limit it is beyond, and takes the limit itself', () => {
    expect(parseNumber('150', { min: 0, max: 100 })).toEqual({
      ok: false,
      reason: 'above',
      detail: '150 is too high: at most 100.',
    });
    expect(parseNumber('-1', { min: 0 })).toEqual({
      ok: false,
      reason: 'below',
      detail: '-1 is too low: at least 0.',
    });
    expect(parseNumber('0', { exclusiveMin: 0 })).toEqual({
      ok: false,
      reason: 'below',
      detail: '0 is too low: it must be more than 0.',
    });
    expect(parseNumber('100', { min: 0, max: 100 })).toEqual({ ok: true, value: 100 });
    expect(parseNumber('0', { min: 0 })).toEqual({ ok: true, value: 0 });
  });
});
