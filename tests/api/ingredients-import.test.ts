import fc from 'fast-check';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import {
  INGREDIENT_CSV_COLUMNS,
  type Ingredient,
  type IngredientImportPreview,
  type IngredientImportResult,
  type IngredientWrite,
} from '#shared/contracts/ingredient.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import { ingredientWrites } from '#tests/support/ingredient-arbitrary.ts';
import { addIngredient, historyOf } from '#tests/support/spec-steps.ts';

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
const exported = async () => (await team.as('developer').get<unknown>(`${at}.csv`)).text;

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

describe('an import', () => {
  beforeAll(async () => {
    await freshTeam();
    await addIngredient(team, { name: 'House gin', note: 'the good one' });
  });

  it('writes the rows that are right, leaves the others, and says so in the history', async () => {
    const csv = 'name,category,abv\nNew liqueur,liqueur,24\nBroken,spirit,999\nHouse gin,spirit,43\n';
    expect((await apply({ csv })).body).toEqual({ created: 1, updated: 1, unchanged: 0 });
    const after = await backBar();
    expect(Object.keys(after).sort()).toEqual(['House gin', 'New liqueur']);
    expect(after['House gin']?.composition.abvFraction).toBe(0.43);
    expect((await historyOf({ team, at: `/teams/${team.id}` }, team.id))[0]).toBe(
      'ingredient.imported: Imported ingredients from CSV: 1 added, 1 changed',
    );
  });

  it('keeps what a column that is not in the file says', async () => {
    const { note, packs, source } = (await backBar())['House gin'] ?? {};
    expect({ note, packs, source }).toEqual({
      note: 'the good one',
      packs: [{ size: 700, sizeUnit: 'ml', price: '21.50', pricedOn: '2026-11-02' }],
      source: 'label',
    });
  });

  it('keeps what stands in the columns that a cut-off row does not reach', async () => {
    expect((await apply({ csv: 'name,abv,note\nHouse gin,44' })).body.updated).toBe(1);
    expect((await backBar())['House gin']).toMatchObject({
      composition: { abvFraction: 0.44 },
      note: 'the good one',
    });
  });

  it('finds the one to change by its name in any capitals, and takes the name as the file has it', async () => {
    expect((await apply({ csv: 'name,abv\nHOUSE GIN,45\n' })).body.updated).toBe(1);
    expect(Object.keys(await backBar())).toContain('HOUSE GIN');
  });

  it('in which nothing is right is refused and writes nothing', async () => {
    const before = await backBar();
    const answer = await apply({ csv: 'name,abv\nA,400\n' });
    expect(answer.fieldErrors).toEqual(['#/csv nothing-to-import']);
    expect(await backBar()).toEqual(before);
  });

  it('of a name that is only among the retired adds it anew', async () => {
    const old = await addIngredient(team, { name: 'Last year’s shrub' });
    await team.as('developer').post(`${at}/${old.id}/retire`, undefined, { ifMatch: old.revision });
    expect((await apply({ csv: 'name\nLast year’s shrub\n' })).body.created).toBe(1);
  });
});

describe('an export', () => {
  beforeEach(freshTeam);

  it('has every column, a mark for spreadsheets, and the file’s name', async () => {
    await addIngredient(team, { name: 'House gin' });
    const answer = await team.as('developer').get<unknown>(`${at}.csv`);
    expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(answer.headers['content-disposition']).toBe('attachment; filename="ingredients.csv"');
    const [headings, row] = answer.text.split('\r\n');
    expect(headings).toBe(`\ufeff${INGREDIENT_CSV_COLUMNS.join(',')}`);
    expect(row).toMatch(/^House gin,spirit,40,0,/);
  });

  it('gives no cell that a spreadsheet would run, and the import takes it back as it was', async () => {
    const names = ['=1+1', '+44 gin', '-5 gin', '@home', "'=quoted", "''-twice", "'70s bitters", '"quoted"'];
    for (const name of names) await addIngredient(team, { name, note: `=SUM(A1:A9)\n+${name}` });
    const csv = await exported();
    const cells = csv.slice(1).split(/\r\n|,/);
    expect(cells.filter((cell) => /^"?[=+\-@\t\r]/.test(cell))).toEqual([]);
    const { body } = await preview({ csv });
    expect(body.errors).toEqual([]);
    expect(body.counts).toEqual({ create: 0, update: 0, unchanged: names.length, refuse: 0 });
  });

  it('into another team makes the same back bar, whatever stands in it', async () => {
    const writes = fc.sample(ingredientWrites, { numRuns: 60, seed: 20261201 });
    for (const [index, write] of writes.entries()) {
      await addIngredient(team, { ...write, name: `${write.name.slice(0, 80)} ${index}` });
    }
    const csv = await exported();
    const original = await backBar();
    expect((await preview({ csv })).body.counts).toEqual({ create: 0, update: 0, unchanged: 60, refuse: 0 });
    await freshTeam();
    const { body } = await apply({ csv });
    expect(body).toEqual({ created: 60, updated: 0, unchanged: 0 });
    expect(await backBar()).toEqual(original);
    expect(await exported()).toBe(csv);
  });

  it('leaves out what is retired', async () => {
    const old = await addIngredient(team, { name: 'Out of use' });
    await addIngredient(team, { name: 'In use' });
    await team.as('developer').post(`${at}/${old.id}/retire`, undefined, { ifMatch: old.revision });
    const csv = await exported();
    expect(csv).toContain('In use');
    expect(csv).not.toContain('Out of use');
  });
});
