import { describe, expect, it } from 'vitest';

import type { SpecLine } from '#shared/contracts/spec.ts';
import { alignLines } from '#shared/specs/align-lines.ts';
import { longestRising } from '#shared/specs/longest-rising.ts';
import { matchLines } from '#shared/specs/match-lines.ts';
import {
  LIME_ID,
  RUM_ID,
  SYRUP_ID,
  aLine,
  aSpecBody,
  anId,
  anIngredientSnapshot,
  frozen,
  theSourIngredients,
} from '#tests/support/builders.ts';

const GIN_ID = anId(104);
const ingredients = [...theSourIngredients(), anIngredientSnapshot({ id: GIN_ID, name: 'gin' })];

const rum = aLine({ id: anId(1), ingredientId: RUM_ID });
const lime = aLine({ id: anId(2), ingredientId: LIME_ID });
const syrup = aLine({ id: anId(3), ingredientId: SYRUP_ID });

function version(...lines: SpecLine[]) {
  return frozen({ body: aSpecBody({ lines }), ingredients });
}

/** Each row as the ids of its lines, `-` for a gap. */
function rowsOf(...versions: ReturnType<typeof version>[]): string[] {
  return alignLines(versions).map((row) => row.cells.map((cell) => cell?.line.id.slice(-2) ?? '-').join(' '));
}

describe('lines of several versions side by side', () => {
  it('stand in one row when they are the same line', () => {
    expect(rowsOf(version(rum, lime), version(rum, lime))).toEqual(['01 01', '02 02']);
  });

  it('stand in one row when the ingredient is the same under another id', () => {
    expect(rowsOf(version(rum, lime), version({ ...lime, id: anId(12) }, { ...rum, id: anId(11) }))).toEqual([
      '01 11',
      '02 12',
    ]);
  });

  it('stand in one row when the ingredient of a line was swapped', () => {
    const rows = alignLines([version(rum, lime), version({ ...rum, ingredientId: GIN_ID }, lime)]);
    expect(rows[0]?.cells.map((cell) => cell?.ingredient?.name)).toEqual(['white rum', 'gin']);
    expect(rows.map((row) => row.isSame)).toEqual([false, true]);
  });

  it('follow the ingredient rather than the id when two lines changed places', () => {
    const swapped = version({ ...rum, ingredientId: LIME_ID }, { ...lime, ingredientId: RUM_ID });
    expect(rowsOf(version(rum, lime), swapped)).toEqual(['01 02', '02 01']);
  });

  it('keep the order of the first version, new lines behind those they follow', () => {
    const bitters = aLine({ id: anId(5), ingredientId: anId(105) });
    expect(rowsOf(version(rum, syrup), version(bitters, rum, lime, syrup), version(syrup, rum))).toEqual([
      '- 05 -',
      '01 01 01',
      '- 02 -',
      '03 03 03',
    ]);
  });

  it('match a third version with what only the second has', () => {
    expect(rowsOf(version(rum), version(rum, lime), version(lime))).toEqual(['01 01 -', '- 02 02']);
  });

  it('keep the same ingredient in the mix and on top apart', () => {
    const float = aLine({ id: anId(7), ingredientId: RUM_ID, stage: 'top' });
    const other = { ...float, id: anId(17) };
    expect(rowsOf(version(rum, float), version(other, { ...rum, id: anId(11) }))).toEqual(['01 11', '07 17']);
  });

  it('stand in one row when the ingredient went to another stage under another id', () => {
    const onTop = aLine({ id: anId(11), ingredientId: RUM_ID, stage: 'top' });
    expect(rowsOf(version(rum, lime), version(lime, onTop))).toEqual(['01 11', '02 02']);
  });

  it('say which rows differ: amount, stage, note or a gap', () => {
    const isSame = (line: SpecLine) => alignLines([version(rum, lime), version(line, lime)])[0]?.isSame;
    expect(isSame(rum)).toBe(true);
    expect(isSame({ ...rum, amount: { value: 59, unit: 'ml' } })).toBe(false);
    expect(isSame({ ...rum, amount: { value: 60, unit: 'g' } })).toBe(false);
    expect(isSame({ ...rum, stage: 'top' })).toBe(false);
    expect(isSame({ ...rum, note: 'overproof' })).toBe(false);
    expect(alignLines([version(rum), version(rum, lime)]).map((row) => row.isSame)).toEqual([true, false]);
  });

  it('carry the name, the place and the ingredient as each version remembers it', () => {
    const forgotten = frozen({ body: aSpecBody({ lines: [lime, rum] }), ingredients: [] });
    const [first] = alignLines([version(rum, lime), forgotten]);
    expect(first).toMatchObject({ key: rum.id, name: 'white rum' });
    expect(first?.cells.map((cell) => cell?.position)).toEqual([0, 1]);
    expect(first?.cells[1]?.ingredient).toBeNull();
  });

  it('are none without versions', () => {
    expect(alignLines([])).toEqual([]);
  });
});

describe('matching lines', () => {
  it('uses no row twice', () => {
    const twice = [rum, { ...rum, id: anId(11) }, { ...rum, id: anId(12) }];
    expect(matchLines({ rows: [[rum], [lime]], lines: twice })).toEqual([0, undefined, undefined]);
  });
});

describe('the longest rising run', () => {
  it.each([
    [[], []],
    [[3], [3]],
    [
      [0, 1, 2],
      [0, 1, 2],
    ],
    [
      [1, 2, 3, 0],
      [1, 2, 3],
    ],
    [
      [3, 0, 1, 2],
      [0, 1, 2],
    ],
    [[2, 1, 0], [2]],
    [
      [0, 3, 1, 2, 4],
      [0, 1, 2, 4],
    ],
  ])('of %j is %j', (numbers, run) => {
    expect(longestRising(frozen(numbers))).toEqual(run);
  });
});
