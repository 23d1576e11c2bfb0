import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import {
  CSV_IMPORT_LIMITS,
  type Ingredient,
  type IngredientImportPreview,
  type IngredientImportResult,
  type IngredientWrite,
} from '#shared/contracts/ingredient.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';

let app: TestApp;
let team: TestTeam;
let at: string;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

async function freshTeam(): Promise<void> {
  team = await app.addTeam();
  at = `/teams/${team.id}/ingredients`;
}

const preview = (body: unknown) =>
  team.as('developer').post<IngredientImportPreview>(`${at}/import/preview`, body);
const apply = (body: unknown) => team.as('developer').post<IngredientImportResult>(`${at}/import`, body);

/** The back bar by name, without what a database adds. */
async function backBar(): Promise<Record<string, IngredientWrite>> {
  const page = await team.as('developer').get<Page<Ingredient>>(at, { query: { limit: 200 } });
  return Object.fromEntries(
    page.body.items.map(
      ({
        id: _id,
        revision: _r,
        computedDensityGPerMl: _d,
        retiredAt: _t,
        createdAt: _c,
        updatedAt: _u,
        ...write
      }) => [write.name, write as IngredientWrite],
    ),
  );
}

const problemsIn = ({ errors }: IngredientImportPreview) =>
  errors.map(({ row, column, value }) => `${row} ${column ?? '-'} ${value}`);
const actions = ({ rows }: IngredientImportPreview) =>
  rows.map(({ row, action, name }) => `${row} ${action} ${name}`);

describe('a preview', () => {
  beforeAll(freshTeam);

  it('says what would be done and writes nothing', async () => {
    const { body } = await preview({ csv: 'name,category,abv\nOld rum,spirit,40\nCider,beer,4.5\n' });
    expect(actions(body)).toEqual(['2 create Old rum', '3 create Cider']);
    expect(body.counts).toEqual({ create: 2, update: 0, unchanged: 0, refuse: 0 });
    expect(body.mapping).toEqual({ name: 0, category: 1, abv_percent: 2 });
    expect(body.rows[0]?.ingredient?.composition.abvFraction).toBe(0.4);
    expect(await backBar()).toEqual({});
  });

  it('names line, field and value of every cell that cannot be read', async () => {
    const csv = [
      'name,category,abv_percent,sugar_g_per_l,citric_g_per_l,allergens_contains',
      'Good,juice,0,80,5,',
      'Bad,tincture,150,-5,abc,nuts; moonlight',
      ',juice,0,0,0,',
      'Worse,juice,1e9,12.5.3,,',
    ].join('\n');
    const { body } = await preview({ csv });
    expect(problemsIn(body)).toEqual([
      '3 category tincture',
      '3 abv_percent 150',
      '3 sugar_g_per_l -5',
      '3 citric_g_per_l abc',
      '3 allergens_contains nuts; moonlight',
      '4 name ',
      '5 abv_percent 1e9',
      '5 sugar_g_per_l 12.5.3',
    ]);
    expect(actions(body)).toEqual(['2 create Good', '3 refuse Bad', '4 refuse ', '5 refuse Worse']);
    for (const { detail } of body.errors) expect(detail.length).toBeGreaterThan(10);
  });

  it('refuses a liquid whose parts do not fit into a litre, at the value that is too much', async () => {
    const csv = 'name,abv_percent,sugar_g_per_l\nSyrup of dreams,96,900\n';
    const { body } = await preview({ csv });
    expect(body.counts.refuse).toBe(1);
    expect(body.errors).toMatchObject([{ row: 2 }]);
  });

  it('refuses the second row of one name, whatever its capitals, and says where the first is', async () => {
    const { body } = await preview({ csv: 'name\nTwice\nother\nTWICE\n' });
    expect(body.errors).toEqual([
      { row: 4, column: 'name', value: 'TWICE', detail: 'line 2 already has this name' },
    ]);
  });

  it('counts lines as the file does, over line breaks in quotes and empty lines', async () => {
    const csv = 'name,note,abv\r\nA,"one\r\ntwo\r\nthree",0\r\n\r\nB,,400\r\n';
    const { body } = await preview({ csv });
    expect(actions(body)).toEqual(['2 create A', '6 refuse B']);
    expect(body.rows[0]?.ingredient?.note).toBe('one\r\ntwo\r\nthree');
  });

  it.each([
    ['a byte order mark', '\ufeffname,abv\nA,12.5\n'],
    ['semicolons and decimal commas', 'name;abv\nA;12,5\n'],
    ['tabs', 'name\tabv\nA\t12.5\n'],
    ['commas and a quoted decimal comma', 'name,abv\nA,"12,5"\n'],
    ['carriage returns', 'name,abv\r\nA,12.5\r\n'],
    ['no line break at the end', 'name,abv\nA,12.5'],
    ['capitals, spaces and signs in the headings', 'Name , ABV %\nA,12.5\n'],
    ['the exponent a spreadsheet writes', 'name,abv\nA,1.25E+01\n'],
  ])('reads %s', async (_what, csv) => {
    const { body } = await preview({ csv });
    expect(body.rows).toMatchObject([
      { row: 2, action: 'create', name: 'A', ingredient: { composition: { abvFraction: 0.125 } } },
    ]);
  });

  it('takes a decimal comma where a thousand would be nonsense, and asks where it would not', async () => {
    const csv = 'name;density_g_per_ml;sugar_g_per_l\nA;1,034;100\nB;1,034;1,100\n';
    const { body } = await preview({ csv });
    expect(body.rows[0]?.ingredient?.composition.densityGPerMl).toBe(1.034);
    expect(problemsIn(body)).toEqual(['3 sugar_g_per_l 1,100']);
  });

  it('leaves a column whose heading stands there twice to the person, and says so', async () => {
    const csv = 'name,abv,abv\nA,40,12\n';
    const guessed = await preview({ csv });
    expect(guessed.body.mapping).toEqual({ name: 0 });
    expect(problemsIn(guessed.body)).toEqual(['1 abv_percent abv, abv']);
    const chosen = await preview({ csv, mapping: { name: 0, abv_percent: 2 } });
    expect(chosen.body.errors).toEqual([]);
    expect(chosen.body.rows[0]?.ingredient?.composition.abvFraction).toBe(0.12);
  });

  it('refuses a row with more cells than headings, since its values stand in the wrong columns', async () => {
    const { body } = await preview({ csv: 'name,category,note\nLime, fresh,juice,from Sicily\nB,juice,\n' });
    expect(actions(body)).toEqual(['2 refuse Lime', '3 create B']);
    expect(body.errors[0]?.detail).toContain('4 cells');
  });

  it('is redone with another mapping, also one that leaves columns out', async () => {
    const csv = 'what,strength in percent\nA,40\n';
    const { body } = await preview({ csv, mapping: { name: 0, abv_percent: 1 } });
    expect(body.rows[0]?.ingredient).toMatchObject({ name: 'A', composition: { abvFraction: 0.4 } });
    const without = await preview({ csv, mapping: { name: 0 } });
    expect(without.body.rows[0]?.ingredient?.composition.abvFraction).toBe(0);
  });
});

describe('a file that cannot be taken', () => {
  beforeAll(freshTeam);

  it.each([
    ['nothing in it', '', '#/csv csv'],
    ['only blanks', ' \n \n', '#/csv csv'],
    ['headings and no row', 'name,abv\n', '#/csv csv'],
    ['a quote that is never closed', 'name,abv\n"A,40\nB,12\n', '#/csv csv'],
    ['a quote in the middle of a cell', 'name,abv\nA "x" y",40\nB"",12\n', '#/csv csv'],
    ['no column for the name', 'drink,abv\nA,40\n', '#/mapping/name required'],
  ])('with %s is refused in words', async (_what, csv, expected) => {
    for (const send of [preview, apply]) {
      const answer = await send({ csv });
      expect(answer.status).toBe(422);
      expect(answer.fieldErrors).toEqual([expected]);
      expect(answer.problem.detail).toMatch(/^(The|Say) .*\.$/s);
    }
    expect(await backBar()).toEqual({});
  });

  it('with more rows than can be read at once is refused with the number', async () => {
    const csv = `name\n${Array.from({ length: CSV_IMPORT_LIMITS.maxRows + 1 }, (_, n) => `n${n}`).join('\n')}\n`;
    const answer = await preview({ csv });
    expect(answer.fieldErrors).toEqual(['#/csv csv']);
    expect(answer.problem.detail).toContain('2001');
  });

  it('with more characters than allowed is refused at the field', async () => {
    const answer = await preview({ csv: `name\n${'x'.repeat(CSV_IMPORT_LIMITS.maxCharacters)}` });
    expect(answer.fieldErrors).toEqual(['#/csv maxLength']);
  });

  it('with a mapping to a column that is not there is refused at that column', async () => {
    const answer = await preview({ csv: 'name\nA\n', mapping: { name: 0, abv_percent: 7 } });
    expect(answer.fieldErrors).toEqual(['#/mapping/abv_percent maximum']);
  });

  it.each([
    [{}, '#/csv required'],
    [{ csv: 5 }, '#/csv type'],
    [{ csv: 'name\nA', mapping: { name: -1 } }, '#/mapping/name minimum'],
    [{ csv: 'name\nA', mapping: { nmae: 0 } }, '#/mapping/nmae additionalProperties'],
  ])('sent as %j is refused at the field', async (body, expected) => {
    expect((await apply(body)).fieldErrors).toEqual([expected]);
  });
});
