import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import { type Spec, type SpecSummary } from '#shared/contracts/spec.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import {
  type Workplace,
  aSavedSour,
  aSourDraft,
  aWorkplace,
  historyOf,
  putDraft,
  readSpec,
  startSpec,
  trySave,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
let place: Workplace;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());

const specs = () => `${place.at}/specs`;
const create = (body: unknown) => place.team.as('developer').post<Spec>(specs(), body);
const rename = (id: string, body: unknown, ifMatch: number) =>
  place.team.as('developer').put<Spec>(`${specs()}/${id}`, body, { ifMatch });
const act = (id: string, action: 'retire' | 'restore', ifMatch: number) =>
  place.team.as('menu-writer').post<Spec>(`${specs()}/${id}/${action}`, undefined, { ifMatch });

describe('starting a spec', () => {
  it('gives it an empty draft to work on, and says so in the history', async () => {
    const answer = await create({ name: '  Slack Tide ', description: ' for the terrace ' });
    expect(answer.headers['etag']).toBe('"1"');
    expect(answer.body).toMatchObject({
      name: 'Slack Tide',
      description: 'for the terrace',
      draft: blankDraft(),
      draftRevision: 1,
      familyId: answer.body.id,
      variantName: null,
      latestVersion: null,
      lockedVersion: null,
      headline: null,
      siblings: [],
      updatedBy: { id: place.team.members.developer.id },
    });
    expect(await readSpec(place, answer.body.id)).toEqual(answer.body);
    expect(await historyOf(place, answer.body.id)).toEqual(['spec.created: Started the spec Slack Tide']);
  });

  it.each([
    [{}, '#/name required'],
    [{ name: '' }, '#/name minLength'],
    [{ name: ' ' }, '#/name pattern'],
    [{ name: 'x'.repeat(121) }, '#/name maxLength'],
    [{ name: 'a', description: 'x'.repeat(1001) }, '#/description maxLength'],
    [{ name: 'a', draft: {} }, '#/draft additionalProperties'],
    ['"a name"', '# type'],
    [null, '# type'],
    [[], '# type'],
  ])('as %j is refused at the field', async (body, expected) => {
    const answer = await create(body);
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toContain(expected);
  });
});

describe('renaming a spec', () => {
  it('raises its revision, leaves its draft, and says both names in the history', async () => {
    const spec = await startSpec(place, 'Old name');
    const { body } = await rename(spec.id, { name: 'New name', variantName: 'tall', description: 'd' }, 1);
    expect(body).toMatchObject({
      name: 'New name',
      variantName: 'tall',
      description: 'd',
      revision: 2,
      draftRevision: 1,
    });
    expect((await historyOf(place, spec.id))[0]).toBe('spec.renamed: Renamed Old name to New name (tall)');
  });

  it('based on an earlier revision is refused with the spec as it stands', async () => {
    const { id } = await startSpec(place);
    const current = (await rename(id, { name: 'Theirs', variantName: null, description: '' }, 1)).body;
    const answer = await rename(id, { name: 'Ours', variantName: null, description: '' }, 1);
    expect(answer.problem).toMatchObject({ name: 'stale-version', currentRevision: 2, current });
    expect(await readSpec(place, id)).toEqual(current);
  });

  it.each([
    [{ name: '', variantName: null, description: '' }, '#/name minLength'],
    [{ name: 'a', variantName: '', description: '' }, '#/variantName minLength'],
    [{ name: 'a', description: '' }, '#/variantName required'],
  ])('to %j is refused at the field', async (body, expected) => {
    const { id } = await startSpec(place);
    expect((await rename(id, body, 1)).fieldErrors).toContain(expected);
  });

  it.each([randomUUID(), 'no-id'])('that is not there (%s) is not found', async (id) => {
    const answer = await rename(id, { name: 'a', variantName: null, description: '' }, 1);
    expect(answer.problem).toMatchObject({ name: 'not-found', resource: 'spec' });
  });
});

describe('retiring a spec', () => {
  it('takes it out of the list; it can be read, but not changed, until it is brought back', async () => {
    const { specId, version } = await aSavedSour(place, 'Off the list');
    const { revision, draftRevision } = await readSpec(place, specId);
    const retired = (await act(specId, 'retire', revision)).body;
    expect(retired.retiredAt).not.toBeNull();
    const query = { search: 'off the list' };
    const list = await place.team.as('bartender').get<Page<SpecSummary>>(specs(), { query });
    expect(list.body.items).toEqual([]);
    expect(await readSpec(place, specId)).toEqual(retired);

    const draft = aSourDraft(place);
    const writes = [
      putDraft(place, { specId, draft, ifMatch: draftRevision }),
      trySave(place, { specId, ifMatch: draftRevision }),
      rename(specId, { name: 'x', variantName: null, description: '' }, retired.revision),
      place.team
        .as('manager')
        .post(`${place.at}/versions/${version.id}/lock`, { confirmed: true }, { ifMatch: 1 }),
    ];
    for (const answer of await Promise.all(writes)) {
      expect(answer.problem).toMatchObject({ name: 'not-allowed-in-state', status: 409 });
    }
    expect((await act(specId, 'restore', retired.revision)).body.retiredAt).toBeNull();
    expect((await putDraft(place, { specId, draft, ifMatch: draftRevision })).status).toBe(200);
    expect((await historyOf(place, specId)).slice(0, 2)).toEqual([
      'spec.restored: Brought back the spec Off the list',
      'spec.retired: Retired the spec Off the list',
    ]);
  });

  it('based on an earlier revision is refused', async () => {
    const { id } = await startSpec(place);
    await act(id, 'retire', 1);
    expect((await act(id, 'restore', 1)).problem).toMatchObject({
      name: 'stale-version',
      currentRevision: 2,
    });
  });
});
