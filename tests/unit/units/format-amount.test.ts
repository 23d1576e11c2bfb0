import { describe, expect, it } from 'vitest';

import { type AmountUnit, formatAmount, unitText } from '#shared/units/amount.ts';

describe('an amount written out', () => {
  it.each<[value: number, unit: AmountUnit, text: string]>([
    [22.5, 'ml', '22.5 ml'],
    [30, 'ml', '30 ml'],
    [0.75, 'oz', '0.75 oz'],
    [0.0625, 'oz', '0.0625 oz'],
    [1 / 3, 'oz', '1/3 oz'],
    [5 / 3, 'oz', '1 2/3 oz'],
    [1 / 32, 'oz', '1/32 oz'],
    [0.123456, 'g', '0.123456 g'],
    [1, 'dash', '1 dash'],
    [2, 'dash', '2 dashes'],
    [0.5, 'bar spoon', '0.5 bar spoon'],
    [1.5, 'bar spoon', '1.5 bar spoons'],
    [4, 'drop', '4 drops'],
    [2, 'piece', '2 pieces'],
    [3, 'part', '3 parts'],
    [2, 'g', '2 g'],
  ])('%d %s is %j', (value, unit, text) => {
    expect(formatAmount({ value, unit })).toBe(text);
  });

  it('has the unit alone in the number that fits', () => {
    expect(unitText({ value: 1, unit: 'dash' })).toBe('dash');
    expect(unitText({ value: 2, unit: 'dash' })).toBe('dashes');
    expect(unitText({ value: 2, unit: 'oz' })).toBe('oz');
  });
});
