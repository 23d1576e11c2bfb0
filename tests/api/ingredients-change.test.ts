import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { type Ingredient } from '#shared/contracts/ingredient.ts';

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
const put = (id: string, body: unknown, ifMatch: number) =>
  team.as('developer').put<Ingredient>(`${at}/${id}`, body, { ifMatch });
const act = (id: string, action: 'retire' | 'restore', ifMatch: number) =>
  team.as('developer').post<Ingredient>(`${at}/${id}/${action}`, undefined, { ifMatch });
const history = (id: string) => historyOf({ team, at: `/teams/${team.id}` }, id);

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
