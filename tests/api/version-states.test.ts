import { createHash, randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Role } from '#shared/contracts/roles.ts';
import type { Version } from '#shared/contracts/version.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import type { Answer } from '#tests/support/client.ts';
import {
  type Workplace,
  aCompositionOf,
  aSavedSour,
  aSourDraft,
  aWorkplace,
  addIngredient,
  draftLine,
  historyOf,
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

type Step = 'state' | 'lock' | 'unlock' | 'retire';
const step = (
  role: Role,
  version: Pick<Version, 'id' | 'revision'>,
  name: Step,
  body: unknown,
): Promise<Answer<Version>> =>
  place.team
    .as(role)
    .post<Version>(`${place.at}/versions/${version.id}/${name}`, body, { ifMatch: version.revision });
const onTrial = (version: Version) => step('developer', version, 'state', { state: 'on trial' });
const lock = (version: Version) => step('menu-writer', version, 'lock', { confirmed: true });
const unlock = (version: Version, reason = 'signed too soon') =>
  step('manager', version, 'unlock', { reason });
const retire = (version: Version, body: unknown = {}) => step('menu-writer', version, 'retire', body);

describe('putting a version on trial', () => {
  it('and back to draft shows on the spec and in the history', async () => {
    const { specId, version } = await aSavedSour(place);
    const trial = await step('developer', version, 'state', { state: 'on trial', reason: 'for Friday' });
    expect(trial.body).toMatchObject({ state: 'on trial', revision: 2 });
    expect(trial.headers['etag']).toBe('"2"');
    expect((await readSpec(place, specId)).latestVersion).toMatchObject({ state: 'on trial' });
    expect((await step('developer', trial.body, 'state', { state: 'draft' })).body.state).toBe('draft');
    expect((await historyOf(place, specId)).slice(0, 2)).toEqual([
      'version.state: Took back to draft House sour version 1',
      'version.state: Put on trial House sour version 1: for Friday',
    ]);
  });

  it('changes nothing else of the version', async () => {
    const { version } = await aSavedSour(place);
    const { body } = await onTrial(version);
    expect({ ...body, state: version.state, revision: version.revision }).toEqual(version);
  });

  it('of an earlier version leaves what the spec says of the newest', async () => {
    const { specId, version } = await aSavedSour(place);
    await save(place, specId);
    await onTrial(version);
    expect((await readSpec(place, specId)).latestVersion).toMatchObject({ number: 2, state: 'draft' });
  });

  it.each([
    [{}, '#/state required'],
    [{ state: 'locked' }, '#/state enum'],
    [{ state: 'on trial', reason: 'x'.repeat(501) }, '#/reason maxLength'],
  ])('as %j is refused at the field', async (body, expected) => {
    const { version } = await aSavedSour(place);
    expect((await step('developer', version, 'state', body)).fieldErrors).toContain(expected);
  });
});

describe('locking a version', () => {
  it('signs what it is, by whom and when, and shows it on the spec', async () => {
    const { specId, version } = await aSavedSour(place, 'Signed sour');
    const { body } = await lock(version);
    expect(body).toMatchObject({
      state: 'locked',
      revision: 2,
      lock: {
        by: { id: place.team.members['menu-writer'].id },
        sha256: expect.stringMatching(/^[0-9a-f]{64}$/) as string,
        statement: expect.stringMatching(
          /^Signed sour version 1, .* is the version to be served\./,
        ) as string,
      },
    });
    expect(Math.abs(Date.parse(body.lock?.at ?? '') - Date.now())).toBeLessThan(60_000);
    expect((await readSpec(place, specId)).lockedVersion).toEqual({
      id: version.id,
      number: 1,
      state: 'locked',
    });
    expect((await historyOf(place, specId))[0]).toBe('version.locked: Locked Signed sour version 1');
  });

  it('signs a digest that anyone can compute again from what the version says', async () => {
    const { body } = await lock((await aSavedSour(place)).version);
    const sorted = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(sorted);
      if (typeof value !== 'object' || value === null) return value;
      const entries = Object.entries(value).map(([key, member]) => [key, sorted(member)] as const);
      return Object.fromEntries(entries.sort(([a], [b]) => (a < b ? -1 : 1)));
    };
    const signed = {
      team: place.team.id,
      spec: body.specId,
      number: body.number,
      body: body.body,
      ingredients: body.ingredients,
      glass: body.glass,
      houseMeasures: body.houseMeasures,
      figures: body.figures,
      calculationVersion: body.calculationVersion,
      signer: body.lock?.by?.id,
      at: body.lock?.at,
    };
    const digest = createHash('sha256')
      .update(JSON.stringify(sorted(signed)))
      .digest('hex');
    expect(body.lock?.sha256).toBe(digest);
  });

  it('retires the version that was locked before, and says so', async () => {
    const { specId, version: first } = await aSavedSour(place, 'Replaced sour');
    await lock(first);
    const second = await save(place, specId, 'better');
    await lock(second);
    const old = (await place.team.as('bartender').get<Version>(`${place.at}/versions/${first.id}`)).body;
    expect(old).toMatchObject({ state: 'retired', lock: { by: expect.anything() as object } });
    expect((await readSpec(place, specId)).lockedVersion).toMatchObject({ id: second.id, number: 2 });
    expect((await historyOf(place, specId)).slice(0, 2).toSorted()).toEqual([
      'version.locked: Locked Replaced sour version 2',
      'version.retired: Retired, since version 2 was locked: Replaced sour version 1',
    ]);
  });

  it('names in the statement every ingredient whose allergens nobody has reviewed, and never says none', async () => {
    const secret = await addIngredient(place.team, {
      name: 'Secret liqueur',
      composition: aCompositionOf({ abvFraction: 0.2 }),
      allergens: { reviewed: false, contains: [], mayContain: [] },
    });
    const { id } = await startSpec(place);
    await writeDraft(
      place,
      id,
      aSourDraft(place, { lines: [draftLine(place.rum, '40 ml'), draftLine(secret, '20 ml')] }),
    );
    const { lock: signed, figures } = (await lock(await save(place, id))).body;
    expect(signed?.statement).toMatch(/Allergens not reviewed: Secret liqueur\.$/);
    expect(figures.allergens.notReviewed).toEqual(['Secret liqueur']);
  });

  it('with every allergen reviewed says that', async () => {
    const { body } = await lock((await aSavedSour(place)).version);
    expect(body.lock?.statement).toMatch(/The allergens of every ingredient were reviewed\.$/);
  });

  it.each([{}, { confirmed: false }, { confirmed: 'yes' }, { confirmed: true, why: 'x' }])(
    'as %j is refused, since nothing was confirmed',
    async (body) => {
      const { version } = await aSavedSour(place);
      expect((await step('menu-writer', version, 'lock', body)).status).toBe(422);
      const now = await place.team.as('bartender').get<Version>(`${place.at}/versions/${version.id}`);
      expect(now.body.state).toBe('draft');
    },
  );

  it('by a developer is refused: who makes a drink does not sign it', async () => {
    const { version } = await aSavedSour(place);
    expect((await step('developer', version, 'lock', { confirmed: true })).problem.name).toBe('forbidden');
  });
});

describe('undoing a lock', () => {
  it('puts the version back on trial, with the reason in the history', async () => {
    const { specId, version } = await aSavedSour(place);
    const locked = (await lock(version)).body;
    const { body } = await unlock(locked, 'wrong rum');
    expect(body).toMatchObject({ state: 'on trial', lock: null, revision: 3 });
    expect(await readSpec(place, specId)).toMatchObject({
      lockedVersion: null,
      latestVersion: { state: 'on trial' },
    });
    expect((await historyOf(place, specId))[0]).toBe(
      'version.unlocked: Undid the lock of House sour version 1: wrong rum',
    );
  });

  it.each([{}, { reason: '' }, { reason: '  ' }])(
    'as %j is refused, since it needs a reason',
    async (body) => {
      const locked = (await lock((await aSavedSour(place)).version)).body;
      expect((await step('manager', locked, 'unlock', body)).fieldErrors[0]).toMatch(/^#\/reason /);
    },
  );

  it('by who signed it is refused: only a manager may', async () => {
    const locked = (await lock((await aSavedSour(place)).version)).body;
    expect((await step('menu-writer', locked, 'unlock', { reason: 'x' })).problem.name).toBe('forbidden');
  });
});

describe('retiring a version', () => {
  it('that is locked leaves the spec without one', async () => {
    const { specId, version } = await aSavedSour(place);
    const locked = (await lock(version)).body;
    expect((await retire(locked, { reason: 'off the menu' })).body.state).toBe('retired');
    expect(await readSpec(place, specId)).toMatchObject({
      lockedVersion: null,
      latestVersion: { state: 'retired' },
    });
    expect((await historyOf(place, specId))[0]).toBe(
      'version.retired: Retired House sour version 1: off the menu',
    );
  });

  it('is for good: no other state follows, and it may still be the base of a new version', async () => {
    const { specId, version } = await aSavedSour(place);
    const retired = (await retire(version)).body;
    for (const answer of [
      await onTrial(retired),
      await lock(retired),
      await unlock(retired),
      await retire(retired),
    ]) {
      expect(answer.problem).toMatchObject({ name: 'not-allowed-in-state', status: 409 });
    }
    const { draftRevision } = await readSpec(place, specId);
    const path = `${place.at}/specs/${specId}/draft/from-version`;
    await place.team.as('developer').post(path, { versionId: version.id }, { ifMatch: draftRevision });
    expect(await save(place, specId)).toMatchObject({ number: 2, parent: { id: version.id } });
  });
});

describe('a change of state', () => {
  it('that does not follow from the present one is refused and says what the version is', async () => {
    const { version } = await aSavedSour(place);
    const back = await step('developer', version, 'state', { state: 'draft' });
    expect(back.problem).toMatchObject({ name: 'not-allowed-in-state' });
    expect(back.problem.detail).toContain('Version 1 is draft');
    expect((await unlock(version)).problem.name).toBe('not-allowed-in-state');
    const locked = (await lock(version)).body;
    expect((await onTrial(locked)).problem.name).toBe('not-allowed-in-state');
    expect((await lock(locked)).problem.name).toBe('not-allowed-in-state');
  });

  it('based on an earlier revision is refused with the version as it stands', async () => {
    const { version } = await aSavedSour(place);
    const current = (await onTrial(version)).body;
    for (const answer of [await lock(version), await retire(version), await unlock(version)]) {
      expect(answer.problem).toMatchObject({
        name: 'stale-version',
        status: 412,
        currentRevision: 2,
        current,
      });
    }
  });

  it.each(['state', 'lock', 'unlock', 'retire'] as const)(
    '(%s) of a version that is not there or another team’s is not found',
    async (name) => {
      const bodies = {
        state: { state: 'on trial' },
        lock: { confirmed: true },
        unlock: { reason: 'x' },
        retire: {},
      };
      const theirs = await aSavedSour(await aWorkplace(app));
      for (const id of [randomUUID(), theirs.version.id, 'no-id']) {
        const answer = await step('manager', { id, revision: 1 }, name, bodies[name]);
        expect(answer.problem).toMatchObject({ name: 'not-found', resource: 'version' });
      }
    },
  );
});
