import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import type { Account, InvitationPreview } from '#shared/contracts/account.ts';
import type {
  HistoryEvent,
  InvitationCreated,
  InvitationList,
  Member,
  MemberList,
  Team,
} from '#shared/contracts/team.ts';
import type { Page } from '#shared/contracts/common.ts';

import { Invitation, Membership } from '#server/modules/teams/team.entity.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import type { ApiClient } from '#tests/support/client.ts';

let app: TestApp;
let team: TestTeam;
let manager: ApiClient;
beforeAll(async () => {
  app = await startTestApp();
});
beforeEach(async () => {
  team = await app.addTeam();
  manager = team.as('manager');
});
afterAll(() => app.stop());

const at = (rest = '') => `/teams/${team.id}${rest}`;
const actionsOf = async () =>
  (await manager.get<Page<HistoryEvent>>(at('/history'))).body.items.map(({ action }) => action);

const A_CHANGE = {
  name: 'The Gannet Rooms',
  country: 'IE',
  currency: 'EUR',
  houseMeasures: { dashMl: 0.9, barSpoonMl: 4, dropMl: 0.06 },
};

describe('making a team', () => {
  it('makes its creator the manager, and belongs to nobody else', async () => {
    const { client, id } = await app.addPerson();
    const made = await client.post<Team>('/teams', { name: ' The Tern ' });
    expect(made.body).toMatchObject({ name: 'The Tern', revision: 1 });
    expect(made.headers['etag']).toBe('"1"');

    const { items } = (await client.get<MemberList>(`/teams/${made.body.id}/members`)).body;
    expect(items).toMatchObject([{ person: { id }, roles: ['manager'] }]);
    expect((await manager.get(`/teams/${made.body.id}`)).status).toBe(404);
    const { items: events } = (await client.get<Page<HistoryEvent>>(`/teams/${made.body.id}/history`)).body;
    expect(events).toMatchObject([{ action: 'team.created', actor: { id }, subjectId: made.body.id }]);
  });

  it('adds it to the teams of the account, in the order of names', async () => {
    const { client } = await app.addPerson();
    await client.post('/teams', { name: 'Tern' });
    await client.post('/teams', { name: 'Auk' });
    const { teams } = (await client.get<Account>('/auth/me')).body;
    expect(teams.map(({ teamName }) => teamName)).toEqual(['Auk', 'Tern']);
  });
});

describe('the settings of a team', () => {
  it('are changed by a manager, with a new revision and an entry in the history', async () => {
    const before = (await manager.get<Team>(at())).body;
    const answer = await manager.put<Team>(at(), A_CHANGE, { ifMatch: before.revision });
    expect(answer.body).toEqual({ ...before, ...A_CHANGE, revision: before.revision + 1 });
    expect(answer.headers['etag']).toBe(`"${before.revision + 1}"`);
    expect((await team.as('bartender').get<Team>(at())).body).toEqual(answer.body);

    const { items } = (await manager.get<Page<HistoryEvent>>(at('/history'))).body;
    expect(items[0]?.summary).toBe(
      'Changed the team: name The Gannet Room → The Gannet Rooms, country GB → IE, currency GBP → EUR, ' +
        'dash 0.8 ml → 0.9 ml, bar spoon 5 ml → 4 ml, drop 0.05 ml → 0.06 ml',
    );
  });

  it('of a stale revision are refused with the team as it stands', async () => {
    const now = (await manager.put<Team>(at(), A_CHANGE, { ifMatch: 1 })).body;
    const answer = await manager.put(at(), { ...A_CHANGE, name: 'Mine' }, { ifMatch: 1 });
    expect(answer.problem).toMatchObject({ name: 'stale-version', currentRevision: 2, current: now });
    expect((await manager.get<Team>(at())).body.name).toBe(A_CHANGE.name);
  });

  it('saved by several at once are saved by one; the others get its state', async () => {
    const names = ['One', 'Two', 'Three', 'Four'];
    const answers = await Promise.all(
      names.map((name) => manager.put<Team>(at(), { ...A_CHANGE, name }, { ifMatch: 1 })),
    );
    const saved = answers.filter(({ status }) => status === 200);
    expect(saved).toHaveLength(1);
    for (const { status, problem } of answers.filter((answer) => answer.isProblem)) {
      expect(status).toBe(412);
      expect(problem.current).toEqual(saved[0]?.body);
    }
    expect(await actionsOf()).toEqual(['team.changed']);
  });

  it('that are the same as before leave revision and history alone', async () => {
    const { id: _id, revision, createdAt: _createdAt, ...same } = (await manager.get<Team>(at())).body;
    expect((await manager.put<Team>(at(), same, { ifMatch: revision })).body.revision).toBe(revision);
    expect(await actionsOf()).toEqual([]);
  });
});

describe('the members', () => {
  it('are seen by everybody in the team; their addresses only by managers', async () => {
    const seen = (await team.as('bartender').get<MemberList>(at('/members'))).body.items;
    expect(seen).toHaveLength(5);
    expect(seen.every(({ email }) => email === null)).toBe(true);
    const managed = (await manager.get<MemberList>(at('/members'))).body.items;
    expect(managed.map(({ email }) => email)).toContain(team.members.bartender.email);
  });

  it('get other roles, which count at once', async () => {
    const { memberId, client } = team.members.bartender;
    expect((await client.get(at('/history'))).status).toBe(403);
    const answer = await manager.put<Member>(
      at(`/members/${memberId}`),
      { roles: ['bartender', 'manager'] },
      { ifMatch: 1 },
    );
    expect(answer.body).toMatchObject({ revision: 2, roles: ['bartender', 'manager'] });
    expect((await client.get(at('/history'))).status).toBe(200);
    expect(await actionsOf()).toEqual(['member.roles-changed']);
  });

  it.each([
    [[], '#/roles minItems'],
    [['manager', 'manager'], '#/roles uniqueItems'],
    [['owner'], '#/roles/0 enum'],
  ])('do not get the roles %j', async (roles, error) => {
    const { memberId } = team.members.bartender;
    const answer = await manager.put(at(`/members/${memberId}`), { roles }, { ifMatch: 1 });
    expect(answer.fieldErrors).toEqual([error]);
  });

  it('changed by somebody else meanwhile are told as stale', async () => {
    const path = at(`/members/${team.members.bartender.memberId}`);
    await manager.put(path, { roles: ['trainer'] }, { ifMatch: 1 });
    const answer = await manager.put(path, { roles: ['developer'] }, { ifMatch: 1 });
    expect(answer.problem).toMatchObject({
      name: 'stale-version',
      currentRevision: 2,
      current: { roles: ['trainer'], revision: 2 },
    });
    expect((await manager.delete(path, { ifMatch: 1 })).status).toBe(412);
  });

  it('who are taken out have no team any more, and may come back', async () => {
    const { memberId, client } = team.members.trainer;
    expect((await manager.delete(at(`/members/${memberId}`), { ifMatch: 1 })).status).toBe(204);
    expect((await client.get(at())).status).toBe(404);
    expect((await client.get<Account>('/auth/me')).body.teams).toEqual([]);
    expect(await actionsOf()).toEqual(['member.removed']);
    expect((await manager.delete(at(`/members/${memberId}`), { ifMatch: 1 })).status).toBe(404);
  });

  it('keep their last manager, whoever asks', async () => {
    const { memberId } = team.members.manager;
    const path = at(`/members/${memberId}`);
    const demoted = await manager.put(path, { roles: ['bartender'] }, { ifMatch: 1 });
    expect(demoted.problem).toMatchObject({ name: 'not-allowed-in-state', status: 409 });
    expect((await manager.delete(path, { ifMatch: 1 })).problem.name).toBe('not-allowed-in-state');
    expect((await manager.put(path, { roles: ['manager', 'trainer'] }, { ifMatch: 1 })).status).toBe(200);
  });

  it('lose a manager who leaves, when another is left', async () => {
    const second = await app.addMember({ teamId: team.id, roles: ['manager'] });
    const path = at(`/members/${team.members.manager.memberId}`);
    expect((await manager.delete(path, { ifMatch: 1 })).status).toBe(204);
    expect((await manager.get(at())).status).toBe(404);
    expect((await second.client.get(at())).status).toBe(200);
  });

  it('keep one manager even when two end each other at the same moment', async () => {
    for (let round = 0; round < 5; round += 1) {
      const pair = await app.addTeam();
      const other = await app.addMember({ teamId: pair.id, roles: ['manager'] });
      const first = pair.members.manager;
      const answers = await Promise.all([
        first.client.put(
          `/teams/${pair.id}/members/${other.memberId}`,
          { roles: ['trainer'] },
          { ifMatch: 1 },
        ),
        other.client.delete(`/teams/${pair.id}/members/${first.memberId}`, { ifMatch: 1 }),
      ]);
      expect(answers.filter((answer) => !answer.isProblem)).toHaveLength(1);
      const managers = await app.orm.em
        .fork()
        .count(Membership, { team: pair.id, roles: { $contains: ['manager'] } });
      expect(managers).toBe(1);
    }
  });
});

describe('an invitation', () => {
  const invite = async (roles = ['trainer'], label = 'the new trainer') =>
    (await manager.post<InvitationCreated>(at('/invitations'), { label, roles })).body;

  it('shows its token once, and keeps only its hash', async () => {
    const { token, invitation } = await invite();
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(invitation).toMatchObject({ label: 'the new trainer', createdBy: { name: 'The manager' } });
    const days = (Date.parse(invitation.expiresAt) - Date.parse(invitation.createdAt)) / 86_400_000;
    expect(days).toBe(7);

    const list = await manager.get<InvitationList>(at('/invitations'));
    expect(list.body.items).toEqual([invitation]);
    expect(list.text).not.toContain(token);
    const row = await app.orm.em.fork().findOneOrFail(Invitation, { id: invitation.id });
    expect(JSON.stringify(row)).not.toContain(token);
    expect((await manager.get(at('/history'))).text).not.toContain(token);
  });

  it('tells its holder what it offers, without signing in', async () => {
    const { token, invitation } = await invite(['trainer', 'bartender']);
    const { body } = await app.stranger().get<InvitationPreview>(`/invitations/${token}`);
    expect(body).toEqual({
      teamName: 'The Gannet Room',
      roles: ['trainer', 'bartender'],
      expiresAt: invitation.expiresAt,
      invitedBy: 'The manager',
    });
  });

  it('lets a new person in with the sign-up, once', async () => {
    const { token } = await invite();
    const person = { email: 'dunlin@example.test', name: 'Dunlin', password: 'a long enough password' };
    await app.stranger().post('/auth/sign-up', { ...person, invitationToken: token });
    const client = app.stranger();
    const account = (
      await client.post<Account>('/auth/sign-in', { email: person.email, password: person.password })
    ).body;
    expect(account.teams).toEqual([{ teamId: team.id, teamName: 'The Gannet Room', roles: ['trainer'] }]);
    expect((await app.stranger().get(`/invitations/${token}`)).status).toBe(404);
    expect((await manager.get<InvitationList>(at('/invitations'))).body.items).toEqual([]);
    expect(await actionsOf()).toEqual(['member.joined', 'invitation.created']);
  });

  it('that was used lets no second person sign up, and makes no account', async () => {
    const { token } = await invite();
    const body = { name: 'Knot', password: 'a long enough password', invitationToken: token };
    await app.stranger().post('/auth/sign-up', { ...body, email: 'knot@example.test' });
    const second = await app.stranger().post('/auth/sign-up', { ...body, email: 'ruff@example.test' });
    expect(second.problem).toMatchObject({ name: 'not-found', resource: 'invitation' });
    const signIn = { email: 'ruff@example.test', password: body.password };
    expect((await app.stranger().post('/auth/sign-in', signIn)).status).toBe(401);
  });

  it('stays open when the address has an account: the person signs in and accepts', async () => {
    const { token } = await invite();
    const known = await app.addPerson();
    const body = {
      email: known.email,
      name: 'Thief',
      password: 'a long enough password',
      invitationToken: token,
    };
    expect((await app.stranger().post('/auth/sign-up', body)).status).toBe(202);
    expect((await known.client.get<Account>('/auth/me')).body.teams).toEqual([]);
    const account = (await known.client.post<Account>(`/invitations/${token}/accept`)).body;
    expect(account.teams).toMatchObject([{ teamId: team.id, roles: ['trainer'] }]);
  });

  it('adds its roles to those a member holds', async () => {
    const { token } = await invite(['developer', 'bartender']);
    const account = (await team.as('bartender').post<Account>(`/invitations/${token}/accept`)).body;
    expect(account.teams[0]?.roles.toSorted()).toEqual(['bartender', 'developer']);
    const members = (await manager.get<MemberList>(at('/members'))).body.items;
    expect(members).toHaveLength(5);
  });

  it('accepted by several at the same moment lets one of them in', async () => {
    const { token } = await invite();
    const people = await Promise.all(Array.from({ length: 5 }, () => app.addPerson()));
    const answers = await Promise.all(
      people.map(({ client }) => client.post(`/invitations/${token}/accept`)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 404, 404, 404, 404]);
    expect(await app.orm.em.fork().count(Membership, { team: team.id })).toBe(6);
  });

  it('ends after its seven days', async () => {
    const { token, invitation } = await invite();
    await app.orm.em
      .fork()
      .nativeUpdate(Invitation, { id: invitation.id }, { expiresAt: new Date(Date.now() - 1000) });
    const { client } = await app.addPerson();
    expect((await client.get(`/invitations/${token}`)).status).toBe(404);
    expect((await client.post(`/invitations/${token}/accept`)).status).toBe(404);
    expect((await manager.get<InvitationList>(at('/invitations'))).body.items).toEqual([]);
    expect((await manager.delete(at(`/invitations/${invitation.id}`))).status).toBe(404);
  });

  it('may be withdrawn', async () => {
    const { token, invitation } = await invite();
    expect((await manager.delete(at(`/invitations/${invitation.id}`))).status).toBe(204);
    expect((await app.stranger().get(`/invitations/${token}`)).status).toBe(404);
    expect((await manager.delete(at(`/invitations/${invitation.id}`))).status).toBe(404);
    expect(await actionsOf()).toEqual(['invitation.withdrawn', 'invitation.created']);
  });

  it.each([['x'.repeat(43)], ['short'], ['x'.repeat(500)], [randomUUID()], ["a'; drop table team; --"]])(
    'with the made-up token %s is answered like one that was used',
    async (made) => {
      const { token } = await invite();
      await team.as('bartender').post(`/invitations/${token}/accept`);
      const used = await app.stranger().get(`/invitations/${token}`);
      const answer = await app.stranger().get(`/invitations/${encodeURIComponent(made)}`);
      expect({ ...answer.problem, instance: '' }).toEqual({ ...used.problem, instance: '' });
    },
  );

  it('for nobody, or with no roles, is told at the field', async () => {
    const answer = await manager.post(at('/invitations'), { label: ' ', roles: [] });
    expect(answer.fieldErrors.sort()).toEqual(['#/label pattern', '#/roles minItems']);
  });
});
