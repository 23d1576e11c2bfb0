import { describe, expect, it } from 'vitest';

import { solveIncreasing } from '#shared/physics/solve-increasing.ts';

const square = (x: number) => ({ value: x * x - 2, slope: 2 * x });

describe('solveIncreasing', () => {
  it('finds a root and says how many steps it took', () => {
    const root = solveIncreasing({
      evaluate: square,
      given: null,
      low: 0,
      high: 2,
      start: 1,
      tolerance: 1e-12,
    });
    expect(root).toMatchObject({ ok: true });
    expect(root.ok && root.x).toBeCloseTo(Math.SQRT2, 12);
    expect(root.ok && root.iterations).toBeLessThan(10);
  });

  it('refuses a bracket without a change of sign instead of answering with an end', () => {
    const evaluate = (x: number) => ({ value: x * x + 1, slope: 2 * x });
    expect(solveIncreasing({ evaluate, given: null, low: 0, high: 4, start: 1, tolerance: 1e-12 })).toEqual({
      ok: false,
      reason: 'not-bracketed',
      atLow: 1,
      atHigh: 17,
    });
  });

  it('answers with an end that is a root', () => {
    const evaluate = (x: number) => ({ value: x, slope: 1 });
    expect(
      solveIncreasing({ evaluate, given: null, low: 0, high: 1, start: 0.5, tolerance: 1e-12 }),
    ).toMatchObject({
      x: 0,
    });
    expect(
      solveIncreasing({ evaluate, given: null, low: -1, high: 0, start: -0.5, tolerance: 1e-12 }),
    ).toMatchObject({
      x: 0,
    });
  });

  it('halves where a Newton step would leave the bracket', () => {
    const evaluate = (x: number) => ({ value: Math.atan(x - 3), slope: 1 / (1 + (x - 3) ** 2) });
    const root = solveIncreasing({
      evaluate,
      given: null,
      low: -100,
      high: 100,
      start: 90,
      tolerance: 1e-12,
    });
    expect(root.ok && root.x).toBeCloseTo(3, 10);
  });

  it('does not stop at a coarse tolerance while it has to halve', () => {
    const evaluate = (x: number) => ({ value: x < 0.3 ? -1 : 1, slope: 1e-9 });
    const root = solveIncreasing({ evaluate, given: null, low: 0, high: 1, start: 0.9, tolerance: 1e-3 });
    expect(root.ok && root.x).toBeCloseTo(0.3, 12);
  });

  it('starts from an end of the bracket when that is the root, and comes back to it', () => {
    const evaluate = (x: number) => ({ value: x - 0.96 - 1e-16, slope: 1 });
    const input = { evaluate, given: null, low: 0, high: 0.96, start: 0.96, tolerance: 1e-8 };
    const root = solveIncreasing({ ...input, isBracketProved: true });
    expect(root.ok && root.x).toBe(0.96);
  });

  it('reports that it did not converge when the function is nonsense', () => {
    const nan = () => ({ value: Number.NaN, slope: 1 });
    const failed = solveIncreasing({
      evaluate: nan,
      given: null,
      low: 0,
      high: 1,
      start: 0.4,
      tolerance: -1,
      isBracketProved: true,
    });
    expect(failed).toMatchObject({ ok: false, reason: 'not-converged' });
  });
});
