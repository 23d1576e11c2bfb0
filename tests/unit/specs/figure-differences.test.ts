import { describe, expect, it } from 'vitest';

import { COMPARED_FIGURES, figureDifferences } from '#shared/specs/figure-differences.ts';
import { frozen, someFigures } from '#tests/support/builders.ts';

function rowOf(figure: string, ...versions: Parameters<typeof figureDifferences>[0]) {
  const row = figureDifferences(frozen(versions)).find((each) => each.figure === figure);
  if (row === undefined) throw new Error(`no row ${figure}`);
  return row;
}

describe('figures side by side', () => {
  it('have one row each, in a fixed order, whatever the versions', () => {
    expect(figureDifferences([someFigures()]).map((row) => row.figure)).toEqual([...COMPARED_FIGURES]);
    expect(new Set(figureDifferences([null]).map((row) => row.label)).size).toBe(COMPARED_FIGURES.length);
  });

  it('are compared with the first version, with their direction', () => {
    const row = rowOf(
      'acidCitricGPerL',
      someFigures({ acidCitricGPerL: 8.4 }),
      someFigures({ acidCitricGPerL: 7.6 }),
      someFigures({ acidCitricGPerL: 9 }),
    );
    expect(row.cells.map((cell) => cell.direction)).toEqual(['same', 'down', 'up']);
    expect(row.cells.map((cell) => cell.difference)).toEqual([
      0,
      expect.closeTo(-0.8, 9) as number,
      expect.closeTo(0.6, 9) as number,
    ]);
    expect(row.isSame).toBe(false);
  });

  it.each([
    ['finalMl', 118, 118.9, 'same'],
    ['finalMl', 118, 119, 'up'],
    ['finalMl', 98, 97.9, 'down'],
    ['abvFraction', 0.182, 0.18209, 'same'],
    ['abvFraction', 0.182, 0.183, 'up'],
    ['acidCitricGPerL', 8.3, 8.4, 'up'],
    ['acidCitricGPerL', 8.4, 8.3, 'down'],
    ['acidCitricGPerL', 8.4, 8.4000000001, 'same'],
    ['sugarAcidRatio', 4e15, 4e15 + 8, 'same'],
    ['sugarAcidRatio', 4000, 4001, 'up'],
  ] as const)(
    '%s from %d to %d is %s: less than one step shown is no change',
    (figure, from, to, direction) => {
      const row = rowOf(figure, someFigures({ [figure]: from }), someFigures({ [figure]: to }));
      expect(row.cells[1]?.direction).toBe(direction);
      expect(row.isSame).toBe(direction === 'same');
    },
  );

  it('are unknown where a version has no such figure, and the same where none has', () => {
    const without = someFigures({ washLine: null, sugarAcidRatio: null });
    const wash = rowOf('headroomMl', someFigures(), without);
    expect(wash.cells[1]).toEqual({ value: null, difference: null, direction: 'unknown' });
    expect(wash.isSame).toBe(false);
    expect(rowOf('sugarAcidRatio', without, without).isSame).toBe(true);
    expect(rowOf('finalMl', null, someFigures()).cells.map((cell) => cell.direction)).toEqual([
      'unknown',
      'unknown',
    ]);
  });

  it('take wash line and headroom from the glass', () => {
    const washLine = { fillMl: 150, heightMm: 61, brimMl: 180, headroomMl: 30 };
    expect(rowOf('washLineMm', someFigures({ washLine })).cells[0]?.value).toBe(61);
    expect(rowOf('headroomMl', someFigures({ washLine })).cells[0]?.value).toBe(30);
  });
});
