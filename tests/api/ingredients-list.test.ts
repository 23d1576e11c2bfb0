import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import { INGREDIENT_SORTS, type Ingredient } from '#shared/contracts/ingredient.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import type { Answer } from '#tests/support/client.ts';
import { addIngredient, aCompositionOf } from '#tests/support/spec-steps.ts';

let app: TestApp;
let team: TestTeam;
let at: string;

/** In the order of people who read them; many share their values, so that only the id tells them apart. */
const NAMES = [
  'apple',
  'Äpple',
  'Apricot',
  'banana',
  'Éclair liqueur',
  'eclipse',
  'Gin 100%',
  'Gin_under',
  'gin\\back',
  'zebra',
];

beforeAll(async () => {
  app = await startTestApp();
  team = await app.addTeam();
  at = `/teams/${team.id}/ingredients`;
  for (const [index, name] of NAMES.toReversed().entries()) {
    await addIngredient(team, {
      name,
      category: index < 5 ? 'spirit' : 'juice',
      composition: aCompositionOf({
        abvFraction: Math.floor(index / 3) / 10,
        sugarGPerL: 10 * (index % 4),
        acidsGPerL: index % 2 === 0 ? { citric: 5 } : {},
      }),
    });
  }
  const old = await addIngredient(team, { name: 'Last year’s apple' });
  await team.as('developer').post(`${at}/${old.id}/retire`, undefined, { ifMatch: 1 });
  await addIngredient(await app.addTeam(), { name: 'apple of another team' });
});
afterAll(() => app.stop());

type Query = Record<string, string | number>;
const list = (query: Query = {}): Promise<Answer<Page<Ingredient>>> =>
  team.as('bartender').get<Page<Ingredient>>(at, { query });
const names = async (query: Query = {}) => (await list(query)).body.items.map(({ name }) => name);

async function throughPages(query: Query): Promise<Ingredient[]> {
  const items: Ingredient[] = [];
  let cursor: string | null = null;
  for (let page = 0; page < 30; page += 1) {
    const { body }: Answer<Page<Ingredient>> = await list(cursor === null ? query : { ...query, cursor });
    items.push(...body.items);
    cursor = body.nextCursor;
    if (cursor === null) return items;
  }
  throw new Error('the list does not end');
}

describe('the back bar', () => {
  it('is sorted by name as people sort, without what is retired or another team’s', async () => {
    expect(await names()).toEqual(NAMES);
  });

  const values: Record<string, (item: Ingredient) => number> = {
    abv: ({ composition }) => composition.abvFraction,
    sugar: ({ composition }) => composition.sugarGPerL,
    acid: ({ composition }) => composition.acidsGPerL.citric ?? 0,
    updated: ({ updatedAt }) => Date.parse(updatedAt),
  };
  it.each(INGREDIENT_SORTS.filter((sort) => !sort.endsWith('name')))('sorts by %s', async (sort) => {
    const sorted = (await list({ sort })).body.items.map(values[sort.replace('-', '')]!);
    const rising = sorted.toSorted((a, b) => a - b);
    expect(new Set(sorted).size).toBeGreaterThan(1);
    expect(sorted).toEqual(sort.startsWith('-') ? rising.toReversed() : rising);
  });

  it('sorts by name backwards', async () => {
    expect(await names({ sort: '-name' })).toEqual(NAMES.toReversed());
  });

  it.each(INGREDIENT_SORTS.flatMap((sort) => [1, 3, 10].map((limit) => [sort, limit] as const)))(
    'by %s in pages of %i comes complete and without repeats',
    async (sort, limit) => {
      const whole = (await list({ sort })).body.items.map(({ id }) => id);
      expect((await throughPages({ sort, limit })).map(({ id }) => id)).toEqual(whole);
    },
  );

  it('goes on after a row that was taken away between two pages', async () => {
    const first = (await list({ limit: 3 })).body;
    const gone = first.items[2]!;
    const path = `${at}/${gone.id}`;
    await team.as('developer').post(`${path}/retire`, undefined, { ifMatch: gone.revision });
    expect(await names({ limit: 3, cursor: first.nextCursor! })).toEqual(NAMES.slice(3, 6));
    await team.as('developer').post(`${path}/restore`, undefined, { ifMatch: gone.revision + 1 });
  });

  it.each([
    ['GIN', ['Gin 100%', 'Gin_under', 'gin\\back']],
    ['éc', ['Éclair liqueur']],
    ['ÉC', ['Éclair liqueur']],
    ['  ppl ', ['apple', 'Äpple']],
    ['%', ['Gin 100%']],
    ['_', ['Gin_under']],
    ['\\', ['gin\\back']],
    ["'; drop table ingredient; --", []],
    ['nothing like it', []],
    ['   ', NAMES],
  ])('searched for “%s” gives what has it in its name, to the letter', async (search, expected) => {
    expect(await names({ search })).toEqual(expected);
  });

  it('takes search, category and sort together, in pages', async () => {
    const query = { search: 'a', category: 'juice', sort: '-name', limit: 1 };
    expect((await throughPages(query)).map(({ name }) => name)).toEqual([
      'Éclair liqueur',
      'banana',
      'Apricot',
      'apple',
    ]);
  });

  it('gives the retired alone, or with the others', async () => {
    expect(await names({ retired: 'only' })).toEqual(['Last year’s apple']);
    expect(await names({ retired: 'all' })).toHaveLength(NAMES.length + 1);
  });
});

describe('a list asked for wrongly', () => {
  it.each([
    [{ limit: 0 }, '#/limit minimum'],
    [{ limit: 201 }, '#/limit maximum'],
    [{ limit: 'many' }, '#/limit type'],
    [{ sort: 'colour' }, '#/sort enum'],
    [{ category: 'potion' }, '#/category enum'],
    [{ retired: 'maybe' }, '#/retired enum'],
    [{ search: 'x'.repeat(121) }, '#/search maxLength'],
    [{ page: 2 }, '#/page additionalProperties'],
  ])('as %j is refused at the field', async (query, expected) => {
    const answer = await list(query);
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toEqual([expected]);
  });

  const encoded = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
  const ID = '00000000-0000-4000-8000-000000000001';
  it.each([
    ['no cursor at all', 'name', 'rubbish'],
    ['something else', 'name', encoded({ name: 'a' })],
    ['another sort', 'name', encoded(['abv', 0.4, ID])],
    ['an id that is none', 'name', encoded(['name', 'a', 'x'])],
    ['a word where a number belongs', 'abv', encoded(['abv', 'abc', ID])],
    ['a number where a word belongs', 'name', encoded(['name', 5, ID])],
    ['a word where a time belongs', '-updated', encoded(['-updated', 'yesterday', ID])],
    ['a time that is none', '-updated', encoded(['-updated', '2026-99-99T00:00:00.000Z', ID])],
    ['text that no database holds', 'name', encoded(['name', 'a\u0000', ID])],
  ])('with a cursor that is %s is refused at the cursor', async (_what, sort, cursor) => {
    const answer = await list({ sort, cursor });
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toEqual(['#/cursor cursor']);
  });
});
