/**
 * Root of an increasing function, by Newton steps held inside a bracket.
 *
 * The bracket is proved first: a function that does not change sign between the ends is refused rather than
 * answered with an end. A Newton step that leaves the bracket is replaced by halving, so the search ends.
 * Sources: none (textbook method).
 */

/** Value of a function and its slope at one point. */
export interface ValueAndSlope {
  readonly value: number;
  readonly slope: number;
}

export type Root =
  | { readonly ok: true; readonly x: number; readonly iterations: number }
  | { readonly ok: false; readonly reason: 'not-bracketed'; readonly atLow: number; readonly atHigh: number }
  | { readonly ok: false; readonly reason: 'not-converged'; readonly x: number; readonly step: number };

/** More than halving needs to get from any bracket to the last bit. */
export const MAX_ITERATIONS = 120;

/**
 * Finds where an increasing function is zero.
 *
 * Formula:   x <- x - f(x) / f'(x), or the middle of the bracket where that leaves it
 * @param input.evaluate          gives value and slope of the function at x
 * @param input.given             what the function needs besides x; handed to it unchanged
 * @param input.low               lower end of the bracket, where the function is not positive
 * @param input.high              upper end of the bracket, where the function is not negative
 * @param input.start             where to begin
 * @param input.tolerance         last step at which the search stops [unit of x]
 * @param input.isBracketProved   the caller has shown that the ends bracket a root: they are not evaluated again
 * @returns                       the root with the iterations it took, or why there is none
 * Range:     low <= high; the function is increasing between them
 * Accuracy:  the last Newton step is at most the tolerance, and what is left is of the order of its square; where the
 *            search had to halve, it goes on to the last bit
 * Limits:    one root is assumed: an increasing function has no more
 * Source:    textbook method
 * @example   solveIncreasing({ evaluate: (x, square) => ({ value: x * x - square, slope: 2 * x }), given: 2, low: 0, high: 2, start: 1, tolerance: 1e-12 }).x // 1.414213562373
 */
export function solveIncreasing<Given>(input: {
  evaluate: (x: number, given: Given) => ValueAndSlope;
  given: Given;
  low: number;
  high: number;
  start: number;
  tolerance: number;
  isBracketProved?: boolean;
}): Root {
  const { evaluate, given, tolerance } = input;
  let { low, high } = input;
  if (input.isBracketProved !== true) {
    const atLow = evaluate(low, given).value;
    if (atLow === 0) return { ok: true, x: low, iterations: 0 };
    const atHigh = evaluate(high, given).value;
    if (atHigh === 0) return { ok: true, x: high, iterations: 0 };
    if (!(atLow < 0 && atHigh > 0)) return { ok: false, reason: 'not-bracketed', atLow, atHigh };
  }
  let x = input.start >= low && input.start <= high ? input.start : (low + high) / 2;
  let step = high - low;
  for (let iterations = 1; iterations <= MAX_ITERATIONS; iterations += 1) {
    const { value, slope } = evaluate(x, given);
    if (value < 0) low = x;
    else high = x;
    const newton = x - value / slope;
    const isNewton = newton >= low - tolerance && newton <= high + tolerance;
    const next = isNewton ? Math.min(high, Math.max(low, newton)) : (low + high) / 2;
    step = Math.abs(next - x);
    x = next;
    if (step <= (isNewton ? tolerance : Number.EPSILON * Math.abs(x))) return { ok: true, x, iterations };
  }
  return { ok: false, reason: 'not-converged', x, step };
}
