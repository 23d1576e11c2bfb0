import { describe, expect, it } from 'vitest';

import { DomainError, requireNotNegative, requireWithin } from '#shared/physics/domain-error.ts';

describe('requireWithin', () => {
  it.each([0, 0.4, 1])('hands %f on', (value) => {
    expect(requireWithin({ quantity: 'abvFraction', value, min: 0, max: 1 })).toBe(value);
  });

  it.each([-0.001, 1.001, Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])(
    'refuses %f, naming quantity, value and limits',
    (value) => {
      const attempt = () => requireWithin({ quantity: 'abvFraction', value, min: 0, max: 1 });
      expect(attempt).toThrow(DomainError);
      expect(attempt).toThrow(`abvFraction is ${value}; it must be from 0 to 1`);
      expect(attempt).toThrow(expect.objectContaining({ quantity: 'abvFraction', min: 0, max: 1 }));
    },
  );
});

describe('requireNotNegative', () => {
  it('takes nothing and something', () => {
    expect(requireNotNegative({ quantity: 'massG', value: 0 })).toBe(0);
    expect(requireNotNegative({ quantity: 'massG', value: 3 })).toBe(3);
  });

  it.each([-1e-9, Number.NaN, Number.POSITIVE_INFINITY])('refuses %f', (value) => {
    expect(() => requireNotNegative({ quantity: 'massG', value })).toThrow(DomainError);
  });
});
