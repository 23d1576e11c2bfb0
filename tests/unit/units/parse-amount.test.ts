import { describe, expect, it } from 'vitest';

import { type AmountUnit, amountTextWithUnit, parseAmount } from '#shared/units/amount.ts';

function read(text: string, defaultUnit: AmountUnit = 'ml') {
  return parseAmount(text, { defaultUnit });
}

describe('an amount that a bartender would write', () => {
  it.each<[text: string, value: number, unit: AmountUnit]>([
    ['1 1/2 oz', 1.5, 'oz'],
    ['1-1/2 oz', 1.5, 'oz'],
    ['1½oz', 1.5, 'oz'],
    ['1 ½ oz', 1.5, 'oz'],
    ['3/4oz', 0.75, 'oz'],
    ['3 / 4 oz', 0.75, 'oz'],
    ['3⁄4 oz', 0.75, 'oz'],
    ['3∕4 oz', 0.75, 'oz'],
    ['5/4 oz', 1.25, 'oz'],
    ['⅓ oz', 1 / 3, 'oz'],
    ['1 2/3 oz', 5 / 3, 'oz'],
    ['⅛ oz', 0.125, 'oz'],
    ['.75 oz', 0.75, 'oz'],
    [',75 oz', 0.75, 'oz'],
    ['0,125 oz', 0.125, 'oz'],
    ['22,5 ml', 22.5, 'ml'],
    ['22.5ml', 22.5, 'ml'],
    ['22. ml', 22, 'ml'],
    ['1.500 oz', 1.5, 'oz'],
    ['30 mL', 30, 'ml'],
    ['30 Millilitres', 30, 'ml'],
    ['30 cc', 30, 'ml'],
    ['5cl', 5, 'cl'],
    ['2 ounces', 2, 'oz'],
    ['1 fl oz', 1, 'oz'],
    ['1 fl. oz.', 1, 'oz'],
    ['1 floz', 1, 'oz'],
    ['30 g', 30, 'g'],
    ['30 gr', 30, 'g'],
    ['30 grams', 30, 'g'],
    ['1 dash', 1, 'dash'],
    ['2 dashes', 2, 'dash'],
    ['1 bsp', 1, 'bar spoon'],
    ['1 bar spoon', 1, 'bar spoon'],
    ['1 bar-spoon', 1, 'bar spoon'],
    ['2 barspoons', 2, 'bar spoon'],
    ['4 drops', 4, 'drop'],
    ['2 pieces', 2, 'piece'],
    ['2 pcs', 2, 'piece'],
    ['1 part', 1, 'part'],
    ['1.5 parts', 1.5, 'part'],
    ['  30\u00a0ml ', 30, 'ml'],
    ['30\u202fml', 30, 'ml'],
    ['３０ ｍｌ', 30, 'ml'],
    ['22，5 ml', 22.5, 'ml'],
    ['10000 ml', 10_000, 'ml'],
    ['0.001 g', 0.001, 'g'],
  ])('%j is %d %s', (text, value, unit) => {
    expect(read(text)).toEqual({ ok: true, amount: { value, unit } });
  });

  it.each<[text: string, unit: AmountUnit, value: number]>([
    ['22.5', 'ml', 22.5],
    ['¾', 'oz', 0.75],
    ['1 1/2', 'oz', 1.5],
    ['2', 'part', 2],
  ])('%j alone is taken for %s', (text, defaultUnit, value) => {
    expect(read(text, defaultUnit)).toEqual({ ok: true, amount: { value, unit: defaultUnit } });
  });
});

describe('text that is not one clear amount', () => {
  it.each<[text: string, reason: string, words: string]>([
    ['', 'empty', 'Write an amount'],
    [' \u00a0 ', 'empty', 'Write an amount'],
    ['-5', 'not-positive', 'more than 0'],
    ['−5 ml', 'not-positive', 'more than 0'],
    ['0', 'not-positive', 'remove the line'],
    ['0,0 ml', 'not-positive', 'remove the line'],
    ['0/4 oz', 'not-positive', 'remove the line'],
    ['0.0001 ml', 'too-small', 'at least 0.001 ml'],
    ['10000.1 ml', 'too-large', 'at most 10000 ml'],
    ['999999999999999999999999 ml', 'too-large', 'at most 10000 ml'],
    ['1/0', 'divides-by-zero', 'divides by nothing'],
    ['1 1/0 oz', 'divides-by-zero', 'divides by nothing'],
    ['1e9', 'unreadable', 'in full'],
    ['abc', 'unreadable', 'such as 22.5 ml'],
    ['NaN', 'unreadable', 'such as 22.5 ml'],
    ['Infinity ml', 'unreadable', 'such as 22.5 ml'],
    ['dash', 'unreadable', 'such as 1 dash'],
    ['barspoons', 'unreadable', 'such as 1 bar spoon'],
    ['1/2/3 oz', 'unreadable', 'like 0.75 or 3/4'],
    ['1 5/4 oz', 'unreadable', 'such as 1 1/2'],
    ['1_000', 'unreadable', 'like 22.5 ml'],
    ['30 ml'.padEnd(200, '!'), 'unreadable', 'too long'],
    ['1,000', 'ambiguous-number', '1000 or 1.000'],
    ['1,125 oz', 'ambiguous-number', '1125 or 1.125'],
    ['1,000.5', 'ambiguous-number', 'without one, such as 1000.5'],
    ['1.000,5 ml', 'ambiguous-number', 'without one, such as 1000.5'],
    ['1,000,000', 'ambiguous-number', 'without one, such as 1000.5'],
    ['1 2 oz', 'two-numbers', 'one amount'],
    ['1 000 ml', 'two-numbers', 'one amount'],
    ['1.5 1/2 oz', 'two-numbers', 'one amount'],
    ['1½½ oz', 'two-numbers', 'one amount'],
    ['1-2 dashes', 'two-numbers', 'one amount'],
    ['2–3 dashes', 'two-numbers', 'one amount'],
    ['2 to 3 dashes', 'two-numbers', 'one amount'],
    ['1 oz 5 ml', 'two-units', 'one number and one unit'],
    ['30 ml + 1 dash', 'two-units', 'one number and one unit'],
    ['30 ml oz', 'two-units', 'one number and one unit'],
    ['2 shots', 'unknown-unit', 'use ml, cl, oz'],
    ['60 ml rum', 'unknown-unit', 'use ml, cl, oz'],
    ['1 l', 'unknown-unit', '1 litre is 1000 ml'],
    ['1 tsp', 'unknown-unit', '5 ml'],
  ])('%j is refused as %s and told what to write', (text, reason, words) => {
    const result = read(text);
    expect(result).toMatchObject({ ok: false, reason });
    expect(result.ok ? '' : result.detail).toContain(words);
  });

  it('answers a long hostile text at once', () => {
    const started = performance.now();
    read(`${'1'.repeat(50_000)}/${' '.repeat(50_000)}x`);
    read(`1${','.repeat(100_000)}`);
    expect(performance.now() - started).toBeLessThan(500);
  });
});

describe('the unit that a number alone was read with', () => {
  it.each([
    ['1.5', '1.5 oz'],
    [' 1½ ', '1½ oz'],
    ['3/4', '3/4 oz'],
  ])('is written behind %j', (text, written) => {
    expect(amountTextWithUnit({ text, defaultUnit: 'oz' })).toBe(written);
  });

  it.each(['20 ml', 'abc', '', '1,000', '-5'])('leaves %j as it was typed', (text) => {
    expect(amountTextWithUnit({ text, defaultUnit: 'oz' })).toBe(text);
  });
});
