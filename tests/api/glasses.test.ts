import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Glass, GlassList, GlassWrite } from '#shared/contracts/glass.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import { historyOf } from '#tests/support/spec-steps.ts';
import { A_GLASS } from '#tests/support/team-world.ts';

let app: TestApp;
let team: TestTeam;
let at: string;
beforeAll(async () => {
  app = await startTestApp();
  team = await app.addTeam();
  at = `/teams/${team.id}/glasses`;
});
afterAll(() => app.stop());

const points = (...pairs: [heightMm: number, radiusMm: number][]): GlassWrite['profile'] =>
  pairs.map(([heightMm, radiusMm]) => ({ heightMm, radiusMm }));
const aGlass = (over: object = {}) => ({ ...A_GLASS, ...over });

const create = (body: unknown) => team.as('developer').post<Glass>(at, body);
const put = (id: string, body: unknown, ifMatch: number) =>
  team.as('developer').put<Glass>(`${at}/${id}`, body, { ifMatch });
const act = (id: string, action: 'retire' | 'restore', ifMatch: number) =>
  team.as('developer').post<Glass>(`${at}/${id}/${action}`, undefined, { ifMatch });
const list = async () => (await team.as('bartender').get<GlassList>(at)).body.items;
const history = (id: string) => historyOf({ team, at: `/teams/${team.id}` }, id);

describe('adding a glass', () => {
  // Volumes of solids from any geometry book: cylinder π r² h, cone π r² h / 3, frustum π h (R² + R r + r²) / 3.
  it.each([
    ['a cylinder', points([0, 30], [100, 30]), Math.PI * 9 * 10],
    ['a cone', points([0, 0], [60, 50]), (Math.PI * 25 * 6) / 3],
    ['a frustum', points([0, 20], [80, 40]), (Math.PI * 8 * (16 + 8 + 4)) / 3],
    ['a cone on a cylinder', points([0, 0], [30, 30], [80, 30]), (Math.PI * 9 * 3) / 3 + Math.PI * 9 * 5],
  ])('%s computes its brim', async (name, profile, brimMl) => {
    const answer = await create(aGlass({ name, profile }));
    expect(answer.body.brimMl).toBeCloseTo(brimMl, 6);
    expect(answer.body).toMatchObject({ name, profile, revision: 1, retiredAt: null });
    expect(answer.headers['etag']).toBe('"1"');
    expect(await list()).toContainEqual(answer.body);
  });

  it('says in the history what it holds', async () => {
    const { body } = await create(aGlass({ name: 'Pony', profile: points([0, 30], [100, 30]) }));
    expect(await history(body.id)).toEqual(['glass.added: Added the glass Pony, 283 ml to the brim']);
  });

  it.each([
    ['no name', { name: '' }, '#/name minLength'],
    ['one point', { profile: points([0, 30]) }, '#/profile minItems'],
    [
      'a profile that does not begin at the bottom',
      { profile: points([5, 30], [50, 30]) },
      '#/profile/0/heightMm minimum',
    ],
    [
      'a height that comes twice',
      { profile: points([0, 30], [50, 30], [50, 40]) },
      '#/profile/2/heightMm rising',
    ],
    [
      'heights that fall',
      { profile: points([0, 30], [50, 30], [40, 40], [90, 40]) },
      '#/profile/2/heightMm rising',
    ],
    ['a negative radius', { profile: points([0, -1], [50, 30]) }, '#/profile/0/radiusMm minimum'],
    ['a negative height', { profile: points([0, 10], [-50, 30]) }, '#/profile/1/heightMm minimum'],
    ['a height in words', { profile: [{ heightMm: 'tall', radiusMm: 1 }] }, '#/profile/0/heightMm type'],
    ['a stem of a billion', { stemMm: 1e9 }, '#/stemMm maximum'],
    ['a brim of its own making', { brimMl: 100 }, '#/brimMl additionalProperties'],
  ])('with %s is refused at the field', async (_what, over, expected) => {
    const answer = await create(aGlass(over));
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toContain(expected);
  });

  it.each([
    ['nothing', points([0, 0], [100, 0])],
    ['less than a teaspoon', points([0, 2], [50, 2])],
    ['more than any bowl', points([0, 150], [390, 150])],
  ])('that holds %s is refused at its profile', async (_what, profile) => {
    const answer = await create(aGlass({ profile }));
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toEqual([expect.stringMatching(/^#\/profile(\/\d\/\w+)? /)]);
  });
});

describe('the list of glasses', () => {
  it('is sorted as people sort, retired ones too, without another team’s', async () => {
    const own = await app.addTeam();
    const path = `/teams/${own.id}/glasses`;
    for (const name of ['Wine', 'coupe', 'Äquator', 'Beaker']) {
      await own.as('developer').post<Glass>(path, aGlass({ name }));
    }
    const [first] = (await own.as('developer').get<GlassList>(path)).body.items;
    await own.as('developer').post(`${path}/${first!.id}/retire`, undefined, { ifMatch: 1 });
    const { items } = (await own.as('bartender').get<GlassList>(path)).body;
    expect(items.map(({ name }) => name)).toEqual(['Äquator', 'Beaker', 'coupe', 'Wine']);
    expect(items.map(({ retiredAt }) => retiredAt !== null)).toEqual([true, false, false, false]);
  });
});

describe('changing a glass', () => {
  it('computes the brim anew and raises the revision', async () => {
    const { id } = (await create(aGlass({ name: 'Grown' }))).body;
    const { body } = await put(id, aGlass({ name: 'Grown', profile: points([0, 30], [120, 30]) }), 1);
    expect(body.revision).toBe(2);
    expect(body.brimMl).toBeCloseTo(Math.PI * 9 * 12, 6);
    expect((await history(id))[0]).toBe('glass.changed: Changed the glass Grown, 339 ml to the brim');
  });

  it('based on an earlier revision is refused with the glass as it stands', async () => {
    const { id } = (await create(aGlass({ name: 'Stale' }))).body;
    const current = (await put(id, aGlass({ name: 'Stale', stemMm: 10 }), 1)).body;
    const answer = await put(id, aGlass({ name: 'Stale', stemMm: 20 }), 1);
    expect(answer.problem).toMatchObject({ name: 'stale-version', status: 412, currentRevision: 2, current });
    expect(await list()).toContainEqual(current);
  });

  it('at once by many leaves one change and tells the others', async () => {
    const { id } = (await create(aGlass({ name: 'Raced' }))).body;
    const answers = await Promise.all(
      Array.from({ length: 15 }, (_, n) => put(id, aGlass({ name: 'Raced', stemMm: n }), 1)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([
      200,
      ...Array.from({ length: 14 }, () => 412),
    ]);
  });

  it.each([randomUUID(), 'no-id'])('that is not there (%s) is not found', async (id) => {
    expect((await put(id, aGlass(), 1)).problem).toMatchObject({ name: 'not-found', resource: 'glass' });
  });

  it('of another team is not found', async () => {
    const other = await app.addTeam();
    const theirs = (await other.as('manager').post<Glass>(`/teams/${other.id}/glasses`, A_GLASS)).body;
    expect((await put(theirs.id, aGlass(), 1)).status).toBe(404);
    expect((await act(theirs.id, 'retire', 1)).status).toBe(404);
  });
});

describe('retiring a glass and bringing it back', () => {
  it('is seen in the list and said in the history', async () => {
    const { id } = (await create(aGlass({ name: 'Chipped', profile: points([0, 30], [100, 30]) }))).body;
    expect((await act(id, 'retire', 1)).body.retiredAt).not.toBeNull();
    expect((await act(id, 'restore', 2)).body).toMatchObject({ retiredAt: null, revision: 3 });
    expect((await history(id)).slice(0, 2)).toEqual([
      'glass.restored: Brought back the glass Chipped, 283 ml to the brim',
      'glass.retired: Retired the glass Chipped, 283 ml to the brim',
    ]);
  });

  it('based on an earlier revision is refused', async () => {
    const { id } = (await create(aGlass({ name: 'Chipped twice' }))).body;
    await act(id, 'retire', 1);
    expect((await act(id, 'restore', 1)).problem.name).toBe('stale-version');
  });
});
