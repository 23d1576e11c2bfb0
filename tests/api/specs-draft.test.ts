import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { type Spec } from '#shared/contracts/spec.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import {
  type Workplace,
  aSavedSour,
  aSourDraft,
  aWorkplace,
  draftLine,
  historyOf,
  putDraft,
  readSpec,
  save,
  startSpec,
  writeDraft,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
let place: Workplace;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());

const specs = () => `${place.at}/specs`;

describe('a draft', () => {
  it('is kept as it was typed, readable or not, and says who wrote it', async () => {
    const { id } = await startSpec(place);
    const lines = [
      draftLine(place.rum, '1 1/2 oz'),
      draftLine(place.lime, 'a good squeeze'),
      draftLine(null, '-5'),
      draftLine(place.syrup, '1e9'),
      draftLine(null, ''),
    ];
    const draft = aSourDraft(place, {
      lines,
      glassId: place.glass.id,
      dilution: { kind: 'weighed', massBeforeG: 100, massAfterG: 140 },
      garnish: 'lime 🍋',
      build: ['Shake.', ''],
    });
    const answer = await putDraft(place, { specId: id, draft, ifMatch: 1 });
    expect(answer.body).toMatchObject({ draft, draftRevision: 2, revision: 1 });
    expect((await readSpec(place, id)).draft).toEqual(draft);
    expect(await historyOf(place, id)).toHaveLength(1);
  });

  it('based on an earlier one is refused with the spec as it stands, and nothing is lost', async () => {
    const { id } = await startSpec(place);
    const theirs = aSourDraft(place, { garnish: 'theirs' });
    const current = (await putDraft(place, { specId: id, draft: theirs, ifMatch: 1 })).body;
    const answer = await putDraft(place, {
      specId: id,
      draft: aSourDraft(place, { garnish: 'ours' }),
      ifMatch: 1,
    });
    expect(answer.problem).toMatchObject({ name: 'stale-version', status: 412, currentRevision: 2, current });
    expect((await readSpec(place, id)).draft).toEqual(theirs);
  });

  it('of thirty lines is taken, of thirty-one refused', async () => {
    const { id } = await startSpec(place);
    const lines = (count: number) => Array.from({ length: count }, () => draftLine(place.rum, '1 ml'));
    const full = { specId: id, draft: aSourDraft(place, { lines: lines(30) }), ifMatch: 1 };
    expect((await putDraft(place, full)).status).toBe(200);
    const answer = await putDraft(place, {
      ...full,
      draft: aSourDraft(place, { lines: lines(31) }),
      ifMatch: 2,
    });
    expect(answer.fieldErrors).toEqual(['#/lines maxItems']);
  });

  const refused: [string, object, string][] = [
    ['a method that is none', { method: 'levitate' }, '#/method enum'],
    ['a dilution by hand of 900 %', { dilution: { kind: 'by hand', dilutionFraction: 9 } }, '#/dilution'],
    ['a negative weighing', { dilution: { kind: 'weighed', massBeforeG: -1, massAfterG: 5 } }, '#/dilution'],
    ['a part of nothing', { partMl: 0 }, '#/partMl exclusiveMinimum'],
    ['ice of -5 g', { glassIce: { kind: 'cubes', massG: -5 } }, '#/glassIce/massG minimum'],
    ['a glass that is no id', { glassId: 'tall' }, '#/glassId'],
    ['thirty-one steps', { build: Array.from({ length: 31 }, () => 'Stir.') }, '#/build maxItems'],
    ['a garnish of 301 letters', { garnish: 'x'.repeat(301) }, '#/garnish maxLength'],
    ['lines that are none', { lines: 'rum' }, '#/lines type'],
  ];
  it.each(refused)('with %s is refused at the field', async (_what, over, expected) => {
    const { id } = await startSpec(place);
    const draft = { ...aSourDraft(place), ...over };
    const answer = await putDraft(place, { specId: id, draft, ifMatch: 1 });
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors.some((error) => error.startsWith(expected))).toBe(true);
    expect((await readSpec(place, id)).draft).toEqual(blankDraft());
  });

  it('with an amount of 41 characters is refused at that line', async () => {
    const { id } = await startSpec(place);
    const draft = aSourDraft(place, {
      lines: [draftLine(place.rum, '1'), draftLine(place.rum, '1'.repeat(41))],
    });
    expect((await putDraft(place, { specId: id, draft, ifMatch: 1 })).fieldErrors).toEqual([
      '#/lines/1/amountText maxLength',
    ]);
  });

  it('with two lines of one id is refused at the second', async () => {
    const { id } = await startSpec(place);
    const line = draftLine(place.rum, '60 ml');
    const draft = aSourDraft(place, { lines: [line, { ...line, amountText: '5 ml' }] });
    expect((await putDraft(place, { specId: id, draft, ifMatch: 1 })).fieldErrors).toEqual([
      '#/lines/1/id twice',
    ]);
  });

  it('naming ingredients and a glass that are not of the team is refused at each', async () => {
    const other = await aWorkplace(app);
    const { id } = await startSpec(place);
    const lines = [
      draftLine(place.rum, '60 ml'),
      draftLine(other.lime, '20 ml'),
      { ...draftLine(null, '20 ml'), ingredientId: randomUUID() },
    ];
    const draft = aSourDraft(place, { lines, glassId: other.glass.id });
    expect((await putDraft(place, { specId: id, draft, ifMatch: 1 })).fieldErrors).toEqual([
      '#/lines/1/ingredientId unknown-ingredient',
      '#/lines/2/ingredientId unknown-ingredient',
      '#/glassId unknown-glass',
    ]);
  });

  it('takes an ingredient that was retired meanwhile, since a draft keeps what it has', async () => {
    const own = await aWorkplace(app);
    const { id } = await startSpec(own);
    await own.team
      .as('developer')
      .post(`${own.at}/ingredients/${own.rum.id}/retire`, undefined, { ifMatch: 1 });
    const answer = await putDraft(own, { specId: id, draft: aSourDraft(own), ifMatch: 1 });
    expect(answer.status).toBe(200);
  });
});

describe('starting the draft from a version', () => {
  const from = (specId: string, versionId: string, ifMatch: number) =>
    place.team
      .as('developer')
      .post<Spec>(`${specs()}/${specId}/draft/from-version`, { versionId }, { ifMatch });

  it('puts the version in place of the draft and makes it the base of the next one', async () => {
    const { specId, version, draft } = await aSavedSour(place);
    await writeDraft(place, specId, aSourDraft(place, { lines: [draftLine(place.rum, '10 ml')] }));
    await save(place, specId, 'a detour');
    const { draftRevision } = await readSpec(place, specId);
    const { body } = await from(specId, version.id, draftRevision);
    expect(body.draftBaseVersionId).toBe(version.id);
    expect(body.draft.lines.map(({ ingredientId, amountText }) => [ingredientId, amountText])).toEqual(
      draft.lines.map(({ ingredientId, amountText }) => [ingredientId, amountText]),
    );
    const third = await save(place, specId, 'back to the first');
    expect(third).toMatchObject({ number: 3, parent: { id: version.id, number: 1 }, changes: [] });
  });

  it('based on an earlier draft is refused with the spec as it stands', async () => {
    const { specId, version } = await aSavedSour(place);
    const answer = await from(specId, version.id, 1);
    expect(answer.problem).toMatchObject({ name: 'stale-version', current: { id: specId } });
  });

  it('takes a sibling’s version, but not one of another drink or team', async () => {
    const { specId, version } = await aSavedSour(place);
    const branch = { fromVersionId: version.id, variantName: 'tall' };
    const sibling = (await place.team.as('developer').post<Spec>(`${specs()}/${specId}/branch`, branch)).body;
    expect((await from(sibling.id, version.id, 1)).status).toBe(200);
    const stranger = await aSavedSour(place, 'Another drink');
    const { draftRevision } = await readSpec(place, specId);
    expect((await from(specId, stranger.version.id, draftRevision)).problem.name).toBe('not-found');
    const theirs = await aSavedSour(await aWorkplace(app));
    expect((await from(specId, theirs.version.id, draftRevision)).problem.name).toBe('not-found');
  });
});
