import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import type { Page } from '#shared/contracts/common.ts';
import type { GlassList } from '#shared/contracts/glass.ts';
import type { Ingredient } from '#shared/contracts/ingredient.ts';
import { ROLES } from '#shared/contracts/roles.ts';
import type { SpecSummary } from '#shared/contracts/spec.ts';
import type { HistoryEvent } from '#shared/contracts/team.ts';
import type { NoteList, Version, VersionList } from '#shared/contracts/version.ts';

import { DEMO_SIGN_INS, isEmpty, seedDemo } from '#server/db/seed.ts';
import { User } from '#server/modules/accounts/account.entity.ts';
import { AuditEvent } from '#server/modules/teams/team.entity.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import { createTestDatabase } from '#tests/support/database.ts';
import type { ApiClient } from '#tests/support/client.ts';
import { createOrm } from '#server/db/orm.ts';

let app: TestApp;
let manager: ApiClient;
let at: string;
let account: Account;
beforeAll(async () => {
  app = await startTestApp();
  expect(await isEmpty(app.orm)).toBe(true);
  await seedDemo(app.orm);
  manager = app.stranger();
  account = await signIn(manager, 'manager');
  at = `/teams/${account.teams[0]!.teamId}`;
});
afterAll(() => app.stop());

async function signIn(client: ApiClient, role: string): Promise<Account> {
  const person = DEMO_SIGN_INS.find(({ roles }) => roles.join() === role)!;
  return (await client.post<Account>('/auth/sign-in', { email: person.email, password: person.password }))
    .body;
}

async function specs(): Promise<SpecSummary[]> {
  return (await manager.get<Page<SpecSummary>>(`${at}/specs`)).body.items;
}

async function allVersions(): Promise<Version[]> {
  const lists = await Promise.all(
    (await specs()).map(({ id }) => manager.get<VersionList>(`${at}/specs/${id}/versions`)),
  );
  return lists.flatMap(({ body }) => body.items);
}

async function backBar(): Promise<Ingredient[]> {
  return (await manager.get<Page<Ingredient>>(`${at}/ingredients`, { query: { limit: 200 } })).body.items;
}

describe('the demo', () => {
  it('lets one person of each role sign in, at an address that is nobody’s', async () => {
    expect(DEMO_SIGN_INS.flatMap(({ roles }) => roles).toSorted()).toEqual(ROLES.toSorted());
    for (const role of ROLES) {
      const { email, teams } = await signIn(app.stranger(), role);
      expect(email).toMatch(/@example\.test$/);
      expect(teams.find(({ teamName }) => teamName === 'The Gannet Room')?.roles).toEqual([role]);
    }
  });

  it('puts the developer into a second team, so that there is one to switch to', async () => {
    const developer = app.stranger();
    const { teams } = await signIn(developer, 'developer');
    expect(teams).toHaveLength(2);
    const second = teams.find(({ teamName }) => teamName !== 'The Gannet Room')!;
    const list = await developer.get<Page<SpecSummary>>(`/teams/${second.teamId}/specs`);
    expect(list.body.items.length).toBeGreaterThan(0);
    expect((await manager.get(`/teams/${second.teamId}/specs`)).status).toBe(404);
  });

  it('has a stocked shelf: generic ingredients with their source, six house preps or more, eight glasses or more', async () => {
    const shelf = await backBar();
    const preps = shelf.filter(({ knowledge }) => knowledge.sugar.how === 'measured');
    expect(preps.length).toBeGreaterThanOrEqual(6);
    expect(shelf.length - preps.length).toBeGreaterThanOrEqual(60);
    expect(shelf.filter(({ source }) => source === '')).toEqual([]);
    expect((await manager.get<GlassList>(`${at}/glasses`)).body.items.length).toBeGreaterThanOrEqual(8);
  });

  it('works on four serves, each in several versions that say why, with one locked and one on trial', async () => {
    const serves = (await specs()).filter(({ variantName }) => variantName === null);
    expect(serves).toHaveLength(4);
    const versions = await allVersions();
    for (const { id, name } of serves) {
      expect(versions.filter(({ specId }) => specId === id).length, name).toBeGreaterThanOrEqual(2);
    }
    expect(versions.filter(({ why }) => why.length < 10)).toEqual([]);
    expect(versions.filter(({ state }) => state === 'locked')).toHaveLength(1);
    expect(versions.filter(({ state }) => state === 'on trial').length).toBeGreaterThanOrEqual(1);
    expect((await specs()).filter(({ variantName }) => variantName !== null).length).toBeGreaterThanOrEqual(
      1,
    );
    const changed = versions.filter(({ parent }) => parent !== null);
    expect(changed.filter(({ changes }) => changes.length === 0)).toEqual([]);
  });

  it('has drinks that could be served: they fit their glass and have no warning', async () => {
    for (const { specName, number, figures } of await allVersions()) {
      const drink = `${specName} ${number}`;
      expect(
        figures.warnings.map(({ code }) => code),
        drink,
      ).toEqual([]);
      expect(figures.washLine?.headroomMl, drink).toBeGreaterThan(0);
      expect(figures.washLine!.fillMl / figures.washLine!.brimMl, drink).toBeGreaterThan(0.4);
    }
  });

  it('has one serve of little alcohol, and the others of the usual strength', async () => {
    const strengths = new Map((await specs()).map(({ name, headline }) => [name, headline!.abvFraction]));
    // A standard that is used in trade: low in alcohol means at most half of the usual 15 to 30 % vol.
    expect(strengths.get('Small Hours')).toBeLessThan(0.08);
    expect(strengths.get('Slack Water')).toBeGreaterThan(0.2);
    expect(strengths.get('Harbour Light')).toBeGreaterThan(0.12);
  });

  it('has tasting notes by several people', async () => {
    const notes = await Promise.all(
      (await allVersions()).map(({ id }) => manager.get<NoteList>(`${at}/versions/${id}/notes`)),
    );
    const authors = new Set(notes.flatMap(({ body }) => body.items.map(({ author }) => author?.name)));
    expect(authors.size).toBeGreaterThanOrEqual(3);
  });

  it('tells its history in the order in which things happened, over days and not in the future', async () => {
    const query = { limit: 200 };
    const { items } = (await manager.get<Page<HistoryEvent>>(`${at}/history`, { query })).body;
    const locked = items.findIndex(({ action }) => action === 'version.locked');
    const saved = items.findIndex(({ summary }) => summary.startsWith('Saved Harbour Light version 1'));
    const started = items.findIndex(({ summary }) => summary === 'Started the spec Harbour Light');
    expect([locked, saved, started].every((index) => index >= 0)).toBe(true);
    expect(locked).toBeLessThan(saved);
    expect(saved).toBeLessThan(started);
    const times = items.map((event) => Date.parse(event.at));
    expect(Math.max(...times) - Math.min(...times)).toBeGreaterThan(24 * 3_600_000);
    expect(Math.max(...times)).toBeLessThanOrEqual(Date.now());
  });

  it('keeps the chain: each version was saved after the one before, and noted after it was saved', async () => {
    const versions = (await allVersions()).toSorted((a, b) => (a.createdAt < b.createdAt ? -1 : 1));
    const when = new Map(versions.map(({ id, createdAt }) => [id, createdAt]));
    for (const { parent, createdAt } of versions) {
      if (parent !== null) expect(when.get(parent.id)! < createdAt).toBe(true);
    }
    expect(versions.every(({ createdAt }) => Date.parse(createdAt) <= Date.now())).toBe(true);
  });

  it('is loaded once: a second time changes nothing', async () => {
    const count = () => app.orm.em.fork().count(AuditEvent);
    const before = await count();
    await seedDemo(app.orm);
    expect(await count()).toBe(before);
    expect(await app.orm.em.fork().count(User)).toBe(DEMO_SIGN_INS.length);
  });

  it('is loaded once by two servers that start together', async () => {
    const { databaseUrl, drop } = await createTestDatabase();
    const servers = await Promise.all([createOrm({ databaseUrl }), createOrm({ databaseUrl })]);
    await Promise.all(servers.map((orm) => seedDemo(orm)));
    expect(await servers[0].em.fork().count(User)).toBe(DEMO_SIGN_INS.length);
    await Promise.all(servers.map((orm) => orm.close(true)));
    await drop();
  });
});
