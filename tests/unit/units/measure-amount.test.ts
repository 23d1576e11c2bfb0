import { describe, expect, it } from 'vitest';

import { type Amount, measureOfAmount } from '#shared/units/amount.ts';
import { ML_PER_CENTILITRE, ML_PER_FLUID_OUNCE } from '#shared/units/measure-amount.ts';
import { volumeMlFromUnit } from '#shared/units/volume-units.ts';

const houseMeasures = Object.freeze({ dashMl: 0.9, barSpoonMl: 4, dropMl: 0.04 });

function measure(amount: Amount) {
  return measureOfAmount({ amount, houseMeasures, partMl: 25 });
}

describe('the factors of the units', () => {
  it('the fluid ounce is 1/128 of a gallon of 231 cubic inches of 2.54 cm (NIST Handbook 44, Appendix C)', () => {
    // 231 × 2.54³ = 231 × 16.387064 = 3785.411784 cm³; ÷ 128 ends after ten decimals, so this is exact.
    expect(ML_PER_FLUID_OUNCE * 128).toBe(3785.411784);
    expect(ML_PER_FLUID_OUNCE).toBe(29.5735295625);
  });

  it('are those that mathjs works with', () => {
    expect(volumeMlFromUnit({ value: 1, unit: 'oz' })).toBe(ML_PER_FLUID_OUNCE);
    expect(volumeMlFromUnit({ value: 1, unit: 'cl' })).toBe(ML_PER_CENTILITRE);
    expect(volumeMlFromUnit({ value: 1, unit: 'ml' })).toBe(1);
  });
});

describe('how much an amount is', () => {
  it.each<[Amount, number]>([
    [{ value: 22.5, unit: 'ml' }, 22.5],
    [{ value: 5, unit: 'cl' }, 50],
    [{ value: 2, unit: 'oz' }, 59.147059125],
    [{ value: 2, unit: 'dash' }, 1.8],
    [{ value: 0.5, unit: 'bar spoon' }, 2],
    [{ value: 25, unit: 'drop' }, 1],
    [{ value: 3, unit: 'part' }, 75],
  ])('%o is a volume of %d ml', (amount, volumeMl) => {
    expect(measure(amount)).toEqual({ kind: 'volume', volumeMl });
  });

  it('grams are a mass, whatever the liquid', () => {
    expect(measure({ value: 30, unit: 'g' })).toEqual({ kind: 'mass', massG: 30 });
  });

  it('pieces are counted', () => {
    expect(measure({ value: 2, unit: 'piece' })).toEqual({ kind: 'pieces', pieces: 2 });
  });
});
