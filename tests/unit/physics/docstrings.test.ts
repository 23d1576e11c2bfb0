import { describe, expect, it } from 'vitest';

import {
  BLOCKS,
  agreesWithShown,
  documentedFunctions,
  faultsOf,
  functionsOfFile,
} from '#tests/support/docstrings.ts';

const physics = documentedFunctions(new URL('../../../shared/physics/', import.meta.url));
const units = documentedFunctions(new URL('../../../shared/units/', import.meta.url)).filter(
  ({ file }) => file === 'volume-units.ts',
);
const functions = [...physics, ...units];

const modules = {
  ...import.meta.glob<Record<string, unknown>>('../../../shared/physics/*.ts', { eager: true }),
  ...import.meta.glob<Record<string, unknown>>('../../../shared/units/volume-units.ts', { eager: true }),
};
/** Everything an example may use: all exports of the modules documented here. */
const scope = Object.assign({}, ...Object.values(modules)) as Record<string, unknown>;

/** Runs an example as a reader would type it. */
function run(expression: string): unknown {
  const names = Object.keys(scope);
  // eslint-disable-next-line @typescript-eslint/no-implied-eval -- an example is text, and running it is the test
  const evaluate = new Function(...names, `'use strict'; return (${expression});`) as (
    ...values: unknown[]
  ) => unknown;
  return evaluate(...names.map((name) => scope[name]));
}

describe('documentation of the calculations', () => {
  it('covers a core of functions', () => {
    expect(functions.length).toBeGreaterThan(40);
  });

  it.each(functions)('$file $name has every block, in order, and the parameters of its signature', (each) => {
    expect(faultsOf(each)).toEqual([]);
  });

  it.each(functions.flatMap((each) => each.examples.map((example) => ({ ...each, ...example }))))(
    '$file $name: the example gives what it shows',
    ({ expression, shown }) => {
      const value = run(expression);
      expect(agreesWithShown(value, shown), `${expression} is ${String(value)}, shown as ${shown}`).toBe(
        true,
      );
    },
  );
});

describe('the checker itself', () => {
  const comment = (lines: string[]) => `/**\n${lines.map((line) => ` * ${line}`).join('\n')}\n */`;
  const complete = [
    'Doubles a mass.',
    'Formula:   2 m',
    '@param input.massG   mass [g]',
    '@returns   twice the mass [g]',
    'Range:     any',
    'Accuracy:  exact',
    'Limits:    none',
    'Source:    arithmetic',
    '@example   double({ massG: 2 }) // 4',
  ];
  const faults = (lines: string[], signature = 'input: { massG: number }') =>
    faultsOf(functionsOfFile('x.ts', `${comment(lines)}\nexport function double(${signature}) {}`)[0]!);

  it('finds nothing wrong with a complete comment', () => {
    expect(faults(complete)).toEqual([]);
  });

  it.each(BLOCKS)('misses %s', (block) => {
    expect(faults(complete.filter((line) => !line.startsWith(block)))).not.toEqual([]);
  });

  it('notices blocks out of order, and a parameter that the signature calls otherwise', () => {
    expect(faults([complete[0]!, ...complete.slice(1).reverse()])).not.toEqual([]);
    expect(faults(complete, 'input: { massKg: number }')).not.toEqual([]);
    expect(faults(complete, 'input: { massG: number; factor: number }')).not.toEqual([]);
  });

  it('compares to the digits shown', () => {
    expect(agreesWithShown(0.91377, '0.9138')).toBe(true);
    expect(agreesWithShown(0.91377, '0.9137')).toBe(false);
    expect(agreesWithShown(-4.47, '-4.47')).toBe(true);
    expect(agreesWithShown(false, 'false')).toBe(true);
    expect(agreesWithShown(true, 'false')).toBe(false);
    expect(agreesWithShown(Number.NaN, '1')).toBe(false);
  });
});
