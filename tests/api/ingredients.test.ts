import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { ALLERGENS, type Ingredient } from '#shared/contracts/ingredient.ts';
import { ROLES } from '#shared/contracts/roles.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import { addIngredient, aCompositionOf, anIngredientWrite, historyOf } from '#tests/support/spec-steps.ts';

let app: TestApp;
let team: TestTeam;
let at: string;
beforeAll(async () => {
  app = await startTestApp();
  team = await app.addTeam();
  at = `/teams/${team.id}/ingredients`;
});
afterAll(() => app.stop());

const read = (id: string) => team.as('developer').get<Ingredient>(`${at}/${id}`);
const create = (body: unknown) => team.as('developer').post<Ingredient>(at, body);
const put = (id: string, body: unknown, ifMatch: number) =>
  team.as('developer').put<Ingredient>(`${at}/${id}`, body, { ifMatch });
const act = (id: string, action: 'retire' | 'restore', ifMatch: number) =>
  team.as('developer').post<Ingredient>(`${at}/${id}/${action}`, undefined, { ifMatch });
const history = (id: string) => historyOf({ team, at: `/teams/${team.id}` }, id);

describe('adding an ingredient', () => {
  it('keeps everything that was written and names the revision', async () => {
    const write = anIngredientWrite({
      name: 'Lime juice of the house',
      category: 'juice',
      composition: aCompositionOf({
        sugarGPerL: 16.5,
        acidsGPerL: { citric: 45.2, malic: 4 },
        densityGPerMl: 1.028,
      }),
      knowledge: {
        abv: { how: 'label', spread: 0 },
        sugar: { how: 'measured', spread: 0.04 },
        acid: { how: 'measured', spread: 0.06 },
      },
      pieceMassG: 42,
      allergens: { reviewed: true, contains: ['celery'], mayContain: ['mustard'] },
      source: 'three lots',
      note: 'first line\nsecond line',
    });
    const answer = await create(write);
    expect(answer.headers['etag']).toBe('"1"');
    expect(answer.body).toMatchObject({
      ...write,
      revision: 1,
      retiredAt: null,
      computedDensityGPerMl: 1.028,
    });
    expect((await read(answer.body.id)).body).toEqual(answer.body);
    expect(await history(answer.body.id)).toEqual(['ingredient.added: Added Lime juice of the house']);
  });

  it.each([
    // OIML R 22 (1975), table II: density of ethanol and water at 20 C by volume.
    ['water', 0, 0.9982],
    ['a spirit of 40 % vol', 0.4, 0.94805],
    ['a spirit of 50 % vol', 0.5, 0.93014],
  ])('computes the density of %s where none was given', async (name, abvFraction, expected) => {
    const { body } = await create(anIngredientWrite({ name, composition: aCompositionOf({ abvFraction }) }));
    expect(body.composition.densityGPerMl).toBeNull();
    expect(body.computedDensityGPerMl).toBeCloseTo(expected, 4);
  });

  it('takes away blanks around name, source and note', async () => {
    const { body } = await create(anIngredientWrite({ name: '  Gin  ', source: ' label ', note: ' dry ' }));
    expect(body).toMatchObject({ name: 'Gin', source: 'label', note: 'dry' });
  });

  it('keeps 33.3 % as 0.333, and an acid of 0 g/L as none', async () => {
    const composition = aCompositionOf({ abvFraction: 33.3 / 100, acidsGPerL: { citric: 0, malic: 2 } });
    const { body } = await create(anIngredientWrite({ name: 'Rinse', composition }));
    expect(body.composition).toMatchObject({ abvFraction: 0.333, acidsGPerL: { malic: 2 } });
    expect(body.composition.acidsGPerL.citric).toBeUndefined();
  });

  const composed = (over: object) => ({ composition: { ...aCompositionOf(), ...over } });
  it.each([
    ['no name', { name: undefined }, '#/name required'],
    ['a name of blanks', { name: '   ' }, '#/name pattern'],
    ['a name of two lines', { name: 'a\nb' }, '#/name pattern'],
    ['a name of 121 letters', { name: 'x'.repeat(121) }, '#/name maxLength'],
    ['a category that is none', { category: 'potion' }, '#/category enum'],
    ['150 % vol', composed({ abvFraction: 1.5 }), '#/composition/abvFraction maximum'],
    ['a negative strength', composed({ abvFraction: -0.05 }), '#/composition/abvFraction minimum'],
    ['a strength in words', composed({ abvFraction: 'abc' }), '#/composition/abvFraction type'],
    ['sugar of -5 g/L', composed({ sugarGPerL: -5 }), '#/composition/sugarGPerL minimum'],
    ['sugar of a billion g/L', composed({ sugarGPerL: 1e9 }), '#/composition/sugarGPerL maximum'],
    ['acid of -1 g/L', composed({ acidsGPerL: { malic: -1 } }), '#/composition/acidsGPerL/malic minimum'],
    [
      'an unknown acid',
      composed({ acidsGPerL: { nitric: 1 } }),
      '#/composition/acidsGPerL/nitric additionalProperties',
    ],
    ['a density of mercury', composed({ densityGPerMl: 13.5 }), '#/composition/densityGPerMl maximum'],
    ['a piece of no mass', { pieceMassG: 0 }, '#/pieceMassG exclusiveMinimum'],
    [
      'an allergen that is none',
      { allergens: { reviewed: true, contains: ['moonlight'], mayContain: [] } },
      '#/allergens/contains/0 enum',
    ],
    [
      'a price in words',
      { packs: [{ size: 700, sizeUnit: 'ml', price: 'cheap', pricedOn: null }] },
      '#/packs/0/price pattern',
    ],
    [
      'a price of a day that is none',
      { packs: [{ size: 700, sizeUnit: 'ml', price: null, pricedOn: '2026-02-31' }] },
      '#/packs/0/pricedOn format',
    ],
    ['a member that nobody knows', { colour: 'green' }, '#/colour additionalProperties'],
  ])('with %s is refused at the field', async (_what, over, expected) => {
    const answer = await create({ ...anIngredientWrite({ name: 'Refused' }), ...over });
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toContain(expected);
  });

  it.each([
    ['spirit and sugar', aCompositionOf({ abvFraction: 0.95, sugarGPerL: 800 })],
    ['acid and spirit', aCompositionOf({ abvFraction: 0.9, acidsGPerL: { citric: 800 } })],
    ['two acids', aCompositionOf({ acidsGPerL: { citric: 900, malic: 900 } })],
  ])(
    'whose %s leave no room for each other in a litre is refused at the composition',
    async (name, composition) => {
      const answer = await create(anIngredientWrite({ name, composition }));
      expect(answer.status).toBe(422);
      expect(answer.fieldErrors).toEqual([expect.stringMatching(/^#\/composition.* does-not-fit$/)]);
    },
  );

  it('with an allergen in both lists is refused at the second', async () => {
    const allergens = { reviewed: true, contains: ['milk', 'nuts'], mayContain: ['eggs', 'nuts'] };
    expect((await create({ ...anIngredientWrite({ name: 'Both' }), allergens })).fieldErrors).toEqual([
      '#/allergens/mayContain/1 twice',
    ]);
  });

  it('takes all fourteen allergens', async () => {
    const allergens = { reviewed: true, contains: [...ALLERGENS], mayContain: [] };
    const { body } = await create(anIngredientWrite({ name: 'Everything', allergens }));
    expect(body.allergens.contains).toHaveLength(14);
  });

  it('of a name in use, in any capitals, is refused with the id of the one that has it', async () => {
    const first = await addIngredient(team, { name: 'Crème de noix' });
    const answer = await create(anIngredientWrite({ name: ' CRÈME de NOIX ' }));
    expect(answer.problem).toMatchObject({
      name: 'already-exists',
      status: 409,
      resource: 'ingredient',
      conflictingId: first.id,
    });
  });

  it('of a name in use by another team is no conflict', async () => {
    await addIngredient(await app.addTeam(), { name: 'Shared name' });
    expect((await create(anIngredientWrite({ name: 'Shared name' }))).status).toBe(201);
  });
});

describe('one ingredient', () => {
  it.each([randomUUID(), 'no-id', '%00', '..'])('with the id %s is not found', async (id) => {
    const answer = await read(encodeURIComponent(id));
    expect(answer.problem).toMatchObject({ name: 'not-found', status: 404 });
  });

  it('of another team is not found, to read or to change', async () => {
    const theirs = await addIngredient(await app.addTeam(), { name: 'Theirs' });
    expect((await read(theirs.id)).status).toBe(404);
    expect((await put(theirs.id, anIngredientWrite({ name: 'Mine' }), 1)).status).toBe(404);
    expect((await act(theirs.id, 'retire', 1)).status).toBe(404);
  });

  it.each(ROLES)('shows packs and prices to a %s only if the role may see costs', async (role) => {
    const { id } = await addIngredient(team, { name: `Costly for the ${role}` });
    const { text, body } = await team.as(role).get<Ingredient>(`${at}/${id}`);
    const maySee = ['manager', 'developer', 'menu-writer'].includes(role);
    expect(body.packs).toEqual(
      maySee ? expect.arrayContaining([expect.objectContaining({ price: '21.50' })]) : null,
    );
    expect(text.includes('21.50')).toBe(maySee);
    const list = await team.as(role).get<unknown>(at);
    expect(list.text.includes('21.50')).toBe(maySee);
  });
});
