/**
 * What the calculations do with nonsense: they stop, and name the quantity, the value and the limits.
 *
 * Values that are merely outside the range of a source are not nonsense: they give a result with a warning
 * (`warning.ts`). Having no solution is an ordinary result with `ok: false`. See docs/decisions/0004.
 */

/** A quantity that makes no physical sense: a fault of the caller, never of a person's typing. */
export class DomainError extends Error {
  override readonly name = 'DomainError';
  readonly quantity: string;
  readonly value: number;
  readonly min: number;
  readonly max: number;

  constructor(input: { quantity: string; value: number; min: number; max: number }) {
    super(`${input.quantity} is ${input.value}; it must be from ${input.min} to ${input.max}`);
    this.quantity = input.quantity;
    this.value = input.value;
    this.min = input.min;
    this.max = input.max;
  }
}

/**
 * Hands a value on when it lies within limits, and stops the calculation when it does not.
 *
 * Formula:   min <= value <= max
 * @param input.quantity   name of the quantity, as in the code [text]
 * @param input.value      the number in question [unit of the quantity]
 * @param input.min        smallest value that makes sense [unit of the quantity]
 * @param input.max        largest value that makes sense [unit of the quantity]
 * @returns                the value itself [unit of the quantity]
 * Range:     any numbers; NaN and infinity never pass
 * Accuracy:  exact
 * Limits:    throws DomainError; what a person types is checked before, and answered at the field
 * Source:    definition
 * @example   requireWithin({ quantity: 'abvFraction', value: 0.4, min: 0, max: 1 }) // 0.4
 */
export function requireWithin(input: { quantity: string; value: number; min: number; max: number }): number {
  if (!Number.isFinite(input.value) || input.value < input.min || input.value > input.max) {
    throw new DomainError(input);
  }
  return input.value;
}

/**
 * Hands a mass or a volume on when it is finite and not negative.
 *
 * Formula:   0 <= value
 * @param input.quantity   name of the quantity, as in the code [text]
 * @param input.value      the number in question [unit of the quantity]
 * @returns                the value itself [unit of the quantity]
 * Range:     any numbers; NaN and infinity never pass
 * Accuracy:  exact
 * Limits:    throws DomainError
 * Source:    definition
 * @example   requireNotNegative({ quantity: 'massG', value: 12.5 }) // 12.5
 */
export function requireNotNegative(input: { quantity: string; value: number }): number {
  return requireWithin({ quantity: input.quantity, value: input.value, min: 0, max: Number.MAX_VALUE });
}
