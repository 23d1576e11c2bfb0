import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Ingredient } from '#shared/contracts/ingredient.ts';
import type { DraftBody } from '#shared/contracts/spec.ts';
import type { Version, VersionList } from '#shared/contracts/version.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import {
  type Workplace,
  aCompositionOf,
  aSavedSour,
  aSourDraft,
  aWorkplace,
  addIngredient,
  anIngredientWrite,
  draftLine,
  historyOf,
  readSpec,
  save,
  startSpec,
  trySave,
  writeDraft,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
let place: Workplace;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());

const readVersion = (id: string) => place.team.as('bartender').get<Version>(`${place.at}/versions/${id}`);
const listOf = (specId: string) =>
  place.team.as('bartender').get<VersionList>(`${place.at}/specs/${specId}/versions`);

/** A spec with this draft, not yet saved, and the answer to saving it. */
async function saved(draft: DraftBody) {
  const { id } = await startSpec(place);
  const { draftRevision } = await writeDraft(place, id, draft);
  return { specId: id, answer: await trySave(place, { specId: id, ifMatch: draftRevision }) };
}

describe('saving a version', () => {
  it('keeps the spec, what every ingredient and the glass were, and the figures', async () => {
    const draft = aSourDraft(place, { glassId: place.glass.id, garnish: 'lime wheel', build: ['Shake.'] });
    const { specId, answer } = await saved(draft);
    const version = answer.body;
    expect(answer.headers['etag']).toBe('"1"');
    expect(version).toMatchObject({
      specId,
      number: 1,
      state: 'draft',
      parent: null,
      why: 'to try it',
      changes: [],
      author: { id: place.team.members.developer.id },
      lock: null,
      noteCount: 0,
      glass: { id: place.glass.id, name: place.glass.name, brimMl: place.glass.brimMl },
      houseMeasures: { dashMl: expect.any(Number) as number },
      calculationVersion: '1',
    });
    expect(version.body.lines.map(({ amount }) => amount)).toEqual([
      { value: 60, unit: 'ml' },
      { value: 22.5, unit: 'ml' },
      { value: 22.5, unit: 'ml' },
    ]);
    expect(version.ingredients.map(({ name }) => name).sort()).toEqual([
      'Lime juice',
      'Sugar syrup',
      'White rum',
    ]);
    expect(version.figures.washLine?.brimMl).toBe(place.glass.brimMl);
    expect((await readVersion(version.id)).body).toEqual(version);
    expect((await historyOf(place, specId))[0]).toBe('version.saved: Saved House sour version 1: to try it');
  });

  it('computes the figures on the server: 60 ml at 40 %, neat', async () => {
    const draft = aSourDraft(place, { lines: [draftLine(place.rum, '60 ml')], dilution: { kind: 'none' } });
    const { figures } = (await saved(draft)).answer.body;
    // Ethanol weighs 0.78924 g/ml at 20 C (OIML R 22), and 60 ml of it alone stay 60 ml.
    expect(figures.finalMl).toBeCloseTo(60, 6);
    expect(figures.abvFraction).toBeCloseTo(0.4, 6);
    expect(figures.ethanolG).toBeCloseTo(60 * 0.4 * 0.78924, 3);
  });

  it('shows it on the spec and makes it the base of the draft, whose revision rises', async () => {
    const { specId, version } = await aSavedSour(place);
    const spec = await readSpec(place, specId);
    expect(spec).toMatchObject({
      latestVersion: { id: version.id, number: 1, state: 'draft' },
      lockedVersion: null,
      draftBaseVersionId: version.id,
      draftRevision: 3,
      headline: {
        finalMl: version.figures.finalMl,
        abvFraction: version.figures.abvFraction,
        sugarGPerL: version.figures.sugarGPerL,
        acidCitricGPerL: version.figures.acidCitricGPerL,
      },
    });
  });

  it('twice by a double click makes one version', async () => {
    const { id } = await startSpec(place);
    const { draftRevision } = await writeDraft(place, id, aSourDraft(place));
    expect((await trySave(place, { specId: id, ifMatch: draftRevision })).status).toBe(201);
    const second = await trySave(place, { specId: id, ifMatch: draftRevision });
    expect(second.problem).toMatchObject({
      name: 'stale-version',
      current: { id, draftRevision: draftRevision + 1 },
    });
    expect((await listOf(id)).body.items).toHaveLength(1);
  });

  it('says what changed against the one before, in words, and numbers them in turn', async () => {
    const { specId, version, draft } = await aSavedSour(place);
    const lines = draft.lines.map((line, index) => (index === 1 ? { ...line, amountText: '20 ml' } : line));
    await writeDraft(place, specId, { ...draft, lines });
    const second = await save(place, specId, 'less sour');
    expect(second).toMatchObject({
      number: 2,
      parent: { id: version.id, specId, number: 1, variantName: null },
    });
    expect(second.changes.map((words) => words.replaceAll(/\p{Zs}/gu, ' '))).toEqual(
      expect.arrayContaining([expect.stringMatching(/^Lime juice 22\.5 → 20 ml/i)]),
    );
    expect((await listOf(specId)).body.items.map(({ number }) => number)).toEqual([2, 1]);
  });

  it('leaves out lines and steps on which nothing was written', async () => {
    const lines = [draftLine(null, ''), draftLine(place.rum, '60 ml'), draftLine(null, '  ')];
    const { body } = (await saved(aSourDraft(place, { lines, build: ['', 'Stir.', '  '] }))).answer.body;
    expect(body.lines).toHaveLength(1);
    expect(body.build).toEqual(['Stir.']);
  });

  it.each([
    ['1 1/2 oz', { value: 1.5, unit: 'oz' }],
    ['22,5 ml', { value: 22.5, unit: 'ml' }],
    ['3/4oz', { value: 0.75, unit: 'oz' }],
    ['2 dashes', { value: 2, unit: 'dash' }],
  ])('understands %s', async (amountText, amount) => {
    const { answer } = await saved(aSourDraft(place, { lines: [draftLine(place.rum, amountText)] }));
    expect(answer.body.body.lines[0]?.amount).toMatchObject(amount);
  });

  it.each(['-5', '1e9', 'abc', '0', '60 lightyears', '9999999 ml', '', '1/0 oz', '∞', 'NaN ml'])(
    'with the amount “%s” is refused at that amount, and saves nothing',
    async (amountText) => {
      const lines = [draftLine(place.lime, '20 ml'), draftLine(place.rum, amountText)];
      const { specId, answer } = await saved(aSourDraft(place, { lines }));
      expect(answer.status).toBe(422);
      expect(answer.fieldErrors).toEqual([expect.stringMatching(/^#\/lines\/1\/amountText /)]);
      expect((await listOf(specId)).body.items).toEqual([]);
      expect((await readSpec(place, specId)).draftRevision).toBe(2);
    },
  );

  it('with a line that has no ingredient is refused at that line', async () => {
    const { answer } = await saved(aSourDraft(place, { lines: [draftLine(null, '60 ml')] }));
    expect(answer.fieldErrors).toEqual(['#/lines/0/ingredientId required']);
  });

  it.each([0, 30])('of %i empty lines is refused at the lines', async (count) => {
    const lines = Array.from({ length: count }, () => draftLine(null, ''));
    expect((await saved(aSourDraft(place, { lines }))).answer.fieldErrors).toEqual(['#/lines min-items']);
  });

  it('counted in pieces of something nobody has weighed is refused at that line', async () => {
    const lines = [draftLine(place.rum, '60 ml'), draftLine(place.lime, '2 pieces')];
    const { answer } = await saved(aSourDraft(place, { lines }));
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toEqual([expect.stringMatching(/^#\/lines\/1.* piece-mass-missing$/)]);
  });

  it('that was weighed to have lost mass is told so in the figures and not refused', async () => {
    const dilution = { kind: 'weighed', massBeforeG: 140, massAfterG: 100 } as const;
    const { answer } = await saved(aSourDraft(place, { dilution }));
    expect(answer.status).toBe(201);
    expect(answer.body.figures.warnings.map(({ code }) => code)).toContain('mass-lost');
  });

  it.each([
    [{}, '#/why required'],
    [{ why: '' }, '#/why minLength'],
    [{ why: '  ' }, '#/why pattern'],
    [{ why: 'x'.repeat(501) }, '#/why maxLength'],
    [{ why: 'a', number: 7 }, '#/number additionalProperties'],
  ])('with %j is refused at the field', async (body, expected) => {
    const { id } = await startSpec(place);
    const path = `${place.at}/specs/${id}/versions`;
    const answer = await place.team.as('developer').post<Version>(path, body, { ifMatch: 1 });
    expect(answer.fieldErrors).toContain(expected);
  });

  it('of a spec that is not there is not found', async () => {
    expect((await trySave(place, { specId: randomUUID(), ifMatch: 1 })).problem.name).toBe('not-found');
  });
});

describe('a version', () => {
  it('stays as it was when an ingredient, the glass and the team’s measures change', async () => {
    const own = await aWorkplace(app);
    const { id } = await startSpec(own);
    const lines = [draftLine(own.rum, '60 ml'), draftLine(own.lime, '2 dashes')];
    await writeDraft(own, id, aSourDraft(own, { lines, glassId: own.glass.id }));
    const before = await save(own, id);
    const manager = own.team.as('manager');
    const stronger = anIngredientWrite({
      name: 'White rum',
      composition: aCompositionOf({ abvFraction: 0.57 }),
    });
    await manager.put<Ingredient>(`${own.at}/ingredients/${own.rum.id}`, stronger, { ifMatch: 1 });
    await manager.post(`${own.at}/glasses/${own.glass.id}/retire`, undefined, { ifMatch: 1 });
    const measures = { dashMl: 1.2, barSpoonMl: 4, dropMl: 0.04 };
    const settings = { name: 'X', country: 'GB', currency: 'GBP', houseMeasures: measures };
    await manager.put(own.at, settings, { ifMatch: 1 });
    const after = await manager.get<Version>(`${own.at}/versions/${before.id}`);
    expect(after.body).toEqual(before);
    expect((await save(own, id, 'with the new rum')).figures.abvFraction).toBeGreaterThan(
      before.figures.abvFraction,
    );
  });

  it('cannot be changed, not even in the database', async () => {
    const { version } = await aSavedSour(place);
    const connection = app.orm.em.getConnection();
    await expect(
      connection.execute(`update spec_version set why = 'another' where id = ?`, [version.id]),
    ).rejects.toThrow(/immutable/);
  });

  it('carries the new name of its spec', async () => {
    const { specId, version } = await aSavedSour(place, 'Before');
    const { revision } = await readSpec(place, specId);
    const name = { name: 'After', variantName: null, description: '' };
    await place.team.as('developer').put(`${place.at}/specs/${specId}`, name, { ifMatch: revision });
    expect((await readVersion(version.id)).body.specName).toBe('After');
  });

  it.each([randomUUID(), 'no-id'])('that is not there (%s) is not found', async (id) => {
    expect((await readVersion(id)).problem).toMatchObject({ name: 'not-found', resource: 'version' });
  });

  it('of another team is not found', async () => {
    const { version } = await aSavedSour(await aWorkplace(app));
    expect((await readVersion(version.id)).status).toBe(404);
  });

  it('shows no price of its ingredients', async () => {
    const { version } = await aSavedSour(place);
    expect((await readVersion(version.id)).text).not.toContain('21.50');
  });
});

describe('a spec with an ingredient that was retired', () => {
  it('may still be saved: the version keeps what it was', async () => {
    const own = await aWorkplace(app);
    const shrub = await addIngredient(own.team, {
      name: 'Shrub',
      composition: aCompositionOf({ sugarGPerL: 300 }),
    });
    const { id } = await startSpec(own);
    await writeDraft(own, id, aSourDraft(own, { lines: [draftLine(shrub, '20 ml')] }));
    await own.team
      .as('developer')
      .post(`${own.at}/ingredients/${shrub.id}/retire`, undefined, { ifMatch: 1 });
    expect((await save(own, id)).ingredients.map(({ name }) => name)).toEqual(['Shrub']);
  });
});
