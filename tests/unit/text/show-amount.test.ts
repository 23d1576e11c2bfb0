import { describe, expect, it } from 'vitest';

import { roundedAmount, showAmountIn } from '#shared/text/show-amount.ts';
import type { AmountUnit } from '#shared/units/amount.ts';

describe('an amount in the other unit', () => {
  it.each<[value: number, unit: AmountUnit, inMl: string, inOunces: string, inFractions: string]>([
    // 1 oz = 29.5735295625 mL (NIST Handbook 44, Appendix C)
    [22.5, 'ml', '22.5 ml', '≈ 0.75 oz', '≈ 3/4 oz'],
    [30, 'ml', '30 ml', '≈ 1 oz', '≈ 1 oz'],
    [45, 'ml', '45 ml', '≈ 1.5 oz', '≈ 1 1/2 oz'],
    [60, 'ml', '60 ml', '≈ 2 oz', '≈ 2 oz'],
    [11.09, 'ml', '11.09 ml', '≈ 0.37 oz', '≈ 3/8 oz'],
    [20, 'ml', '20 ml', '≈ 0.68 oz', '≈ 0.68 oz'],
    [25, 'ml', '25 ml', '≈ 0.85 oz', '≈ 0.85 oz'],
    [0.1, 'ml', '0.1 ml', '≈ 0.003 oz', '≈ 0.003 oz'],
    [1000, 'ml', '1000 ml', '≈ 33.8 oz', '≈ 33.8 oz'],
    [5, 'cl', '50 ml', '≈ 1.69 oz', '≈ 1.69 oz'],
    [29.5735295625, 'ml', '29.5735295625 ml', '1 oz', '1 oz'],
    [0.75, 'oz', '≈ 22.2 ml', '0.75 oz', '3/4 oz'],
    [1.125, 'oz', '≈ 33.3 ml', '1.125 oz', '1 1/8 oz'],
    [1 / 3, 'oz', '≈ 9.9 ml', '1/3 oz', '1/3 oz'],
    [0.001, 'oz', '≈ 0.03 ml', '0.001 oz', '0.001 oz'],
  ])('%d %s reads %j, %j or %j', (value, unit, inMl, inOunces, inFractions) => {
    const amount = Object.freeze({ value, unit });
    expect(showAmountIn(amount, 'ml')).toBe(inMl);
    expect(showAmountIn(amount, 'oz')).toBe(inOunces);
    expect(showAmountIn(amount, 'oz', { fractions: true })).toBe(inFractions);
  });

  it.each<[number, AmountUnit, string]>([
    [2, 'dash', '2 dashes'],
    [10, 'g', '10 g'],
    [1, 'bar spoon', '1 bar spoon'],
    [2, 'part', '2 parts'],
  ])('%d %s stays what it is', (value, unit, text) => {
    expect(showAmountIn({ value, unit }, 'ml')).toBe(text);
    expect(showAmountIn({ value, unit }, 'oz')).toBe(text);
  });
});

describe('a computed amount', () => {
  it.each([
    [22.5 / 1.4, 16.07],
    [1 / 3, 0.3333],
    [270, 270],
    [1234.5, 1235],
  ])('%d is rounded to %d', (value, rounded) => {
    expect(roundedAmount({ value, unit: 'ml' })).toEqual({ value: rounded, unit: 'ml' });
  });
});
