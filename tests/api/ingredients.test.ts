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

describe('changing an ingredient', () => {
  it('raises the revision and says in the history what changed, in words', async () => {
    const ingredient = await addIngredient(team, {
      name: 'Lime, changed',
      composition: aCompositionOf({ sugarGPerL: 17, acidsGPerL: { citric: 45 } }),
    });
    const write = anIngredientWrite({
      name: 'Lime, changed',
      composition: aCompositionOf({ sugarGPerL: 17, acidsGPerL: { citric: 46 } }),
      note: 'new lot',
    });
    const answer = await put(ingredient.id, write, 1);
    expect(answer.body).toMatchObject({ revision: 2, note: 'new lot' });
    expect(answer.headers['etag']).toBe('"2"');
    expect(answer.body.updatedAt > ingredient.updatedAt).toBe(true);
    expect((await history(ingredient.id))[0]).toBe(
      'ingredient.changed: Lime, changed: citric acid 45.0 g/L → 46.0 g/L, note changed',
    );
  });

  it('that changes nothing keeps revision and history', async () => {
    const ingredient = await addIngredient(team, { name: 'Unchanged' });
    const answer = await put(ingredient.id, anIngredientWrite({ name: ' Unchanged ' }), 1);
    expect(answer.body).toEqual(ingredient);
    expect(await history(ingredient.id)).toHaveLength(1);
  });

  it('takes away acids, packs and a density that are no longer there', async () => {
    const ingredient = await addIngredient(team, {
      name: 'Emptied',
      composition: aCompositionOf({ acidsGPerL: { citric: 5, malic: 3 }, densityGPerMl: 1.01 }),
    });
    const write = anIngredientWrite({
      name: 'Emptied',
      composition: aCompositionOf({ acidsGPerL: { malic: 3 } }),
      packs: [],
    });
    await put(ingredient.id, write, 1);
    const { composition, packs } = (await read(ingredient.id)).body;
    expect({ composition, packs }).toEqual({ composition: write.composition, packs: [] });
  });

  it('never writes a price into the history', async () => {
    const ingredient = await addIngredient(team, { name: 'Priced' });
    const packs = [{ size: 700, sizeUnit: 'ml' as const, price: '987.65', pricedOn: null }];
    await put(ingredient.id, anIngredientWrite({ name: 'Priced', packs }), 1);
    expect((await history(ingredient.id)).join()).not.toContain('987');
  });

  it('based on an earlier revision is refused with the ingredient as it stands, and changes nothing', async () => {
    const ingredient = await addIngredient(team, { name: 'Stale' });
    const current = (await put(ingredient.id, anIngredientWrite({ name: 'Stale', note: 'theirs' }), 1)).body;
    const answer = await put(ingredient.id, anIngredientWrite({ name: 'Stale', note: 'ours' }), 1);
    expect(answer.problem).toMatchObject({ name: 'stale-version', status: 412, currentRevision: 2, current });
    expect((await read(ingredient.id)).body).toEqual(current);
  });

  it('without saying on which revision it is based is refused', async () => {
    const { id } = await addIngredient(team, { name: 'Unguarded' });
    const answer = await team
      .as('developer')
      .put<Ingredient>(`${at}/${id}`, anIngredientWrite({ name: 'x' }));
    expect(answer.problem).toMatchObject({ name: 'precondition-required', status: 428 });
  });

  it('with nonsense is refused at the field and changes nothing', async () => {
    const ingredient = await addIngredient(team, { name: 'Nonsense' });
    const bad = anIngredientWrite({ name: 'Nonsense', composition: aCompositionOf({ abvFraction: 1.5 }) });
    expect((await put(ingredient.id, bad, 1)).fieldErrors).toEqual(['#/composition/abvFraction maximum']);
    expect((await read(ingredient.id)).body).toEqual(ingredient);
  });

  it('to a name in use is refused; to its own in other capitals it is not', async () => {
    const first = await addIngredient(team, { name: 'First name' });
    const second = await addIngredient(team, { name: 'Second name' });
    const clash = await put(second.id, anIngredientWrite({ name: 'FIRST name' }), 1);
    expect(clash.problem).toMatchObject({ name: 'already-exists', conflictingId: first.id });
    expect((await put(second.id, anIngredientWrite({ name: 'SECOND NAME' }), 1)).body.name).toBe(
      'SECOND NAME',
    );
  });
});

describe('retiring and bringing back', () => {
  it('takes an ingredient out of use, and the history says both', async () => {
    const { id } = await addIngredient(team, { name: 'Seasonal' });
    const retired = (await act(id, 'retire', 1)).body;
    expect(Date.parse(retired.retiredAt ?? '')).toBeGreaterThan(Date.now() - 60_000);
    expect((await read(id)).body).toEqual(retired);
    expect((await act(id, 'restore', 2)).body).toMatchObject({ retiredAt: null, revision: 3 });
    expect((await history(id)).slice(0, 2)).toEqual([
      'ingredient.restored: Brought back Seasonal',
      'ingredient.retired: Retired Seasonal',
    ]);
  });

  it('twice is as good as once', async () => {
    const { id } = await addIngredient(team, { name: 'Twice retired' });
    const once = (await act(id, 'retire', 1)).body;
    expect((await act(id, 'retire', once.revision)).body).toEqual(once);
    expect(await history(id)).toHaveLength(2);
  });

  it('based on an earlier revision is refused with the ingredient as it stands', async () => {
    const { id } = await addIngredient(team, { name: 'Stale retired' });
    const current = (await act(id, 'retire', 1)).body;
    expect((await act(id, 'restore', 1)).problem).toMatchObject({ name: 'stale-version', current });
  });

  it('frees the name, and bringing back to a name that is taken by now is refused', async () => {
    const old = await addIngredient(team, { name: 'Vintage' });
    await act(old.id, 'retire', 1);
    const heir = await addIngredient(team, { name: 'vintage' });
    expect((await act(old.id, 'restore', 2)).problem).toMatchObject({
      name: 'already-exists',
      conflictingId: heir.id,
    });
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
