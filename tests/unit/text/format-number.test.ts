import { describe, expect, it } from 'vitest';

import { formatNumber, formatSigned, formatTrimmed } from '#shared/text/format-number.ts';

describe('a number as people read it', () => {
  it.each([
    [8.4, 1, '8.4'],
    [8, 2, '8.00'],
    [-5.25, 1, '\u22125.3'],
    [-0.04, 1, '0.0'],
    [0, 0, '0'],
    [1234.5, 0, '1235'],
  ])('%d with %d decimals is %j', (value, decimals, text) => {
    expect(formatNumber({ value, decimals })).toBe(text);
  });

  it.each([
    [22.5, 2, '22.5'],
    [30, 2, '30'],
    [100, 0, '100'],
    [0.004, 2, '0'],
    [-0.5, 2, '\u22120.5'],
  ])('%d without the zeros at its end is %j', (value, decimals, text) => {
    expect(formatTrimmed({ value, decimals })).toBe(text);
  });

  it.each([
    [0.3, 1, '+0.3'],
    [-1, 1, '\u22121.0'],
    [0.04, 1, '0.0'],
    [-0.04, 1, '0.0'],
    [0, 0, '0'],
  ])('%d as a difference is %j', (value, decimals, text) => {
    expect(formatSigned({ value, decimals })).toBe(text);
  });
});
