import { describe, expect, it } from 'vitest';

import { STANDARD_DRINKS, STANDARD_DRINK_PLACES } from '#shared/physics/data/standard-drinks.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import { energyOf } from '#shared/physics/energy.ts';
import { standardDrinks } from '#shared/physics/standard-drinks.ts';

describe('standard drinks', () => {
  it.each(STANDARD_DRINK_PLACES)(
    '%s has a name, grams between 8 and 20, and says how sure they are',
    (place) => {
      const drink = STANDARD_DRINKS[place];
      expect(drink.name).not.toBe('');
      expect(drink.ethanolG).toBeGreaterThanOrEqual(8);
      expect(drink.ethanolG).toBeLessThanOrEqual(20);
      expect(drink.source).toMatch(/from memory/);
    },
  );

  it('are none in a drink without alcohol', () => {
    expect(standardDrinks({ ethanolG: 0, place: 'GB' })).toBe(0);
  });

  it('are not counted of nonsense', () => {
    expect(() => standardDrinks({ ethanolG: -1, place: 'GB' })).toThrow(DomainError);
  });
});

describe('energy', () => {
  it('adds ethanol, sugar and acid', () => {
    expect(energyOf({ ethanolG: 1, sugarG: 1, acidG: 1 })).toEqual({ kcal: 14, kJ: 59 });
  });

  it.each(['ethanolG', 'sugarG', 'acidG'])('refuses a negative %s', (quantity) => {
    expect(() => energyOf({ ethanolG: 1, sugarG: 1, acidG: 1, [quantity]: -1 })).toThrow(DomainError);
  });
});
