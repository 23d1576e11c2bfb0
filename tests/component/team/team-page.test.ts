import { flushPromises } from '@vue/test-utils';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import type { Role } from '#shared/contracts/roles.ts';
import type { Member, Team } from '#shared/contracts/team.ts';
import TeamPage from '#src/pages/team/TeamPage.vue';
import { useSessionStore } from '#src/stores/session.ts';
import { useTeamStore } from '#src/stores/team.ts';
import { allByRole, byRole, fieldNamed, textOf, typeInto } from '#tests/support/by-role.ts';
import { anId } from '#tests/support/builders.ts';
import { type FakeAnswer, type SentRequest, aProblem, fakeApi } from '#tests/support/fake-api.ts';
import { mountPage } from '#tests/support/mount-app.ts';

const TEAM_ID = anId(7);
const TEAM: Team = {
  id: TEAM_ID,
  revision: 3,
  name: 'The Gannet Room',
  country: 'GB',
  currency: 'GBP',
  houseMeasures: { dashMl: 0.8, barSpoonMl: 5, dropMl: 0.05 },
  createdAt: '2026-10-01T10:00:00.000Z',
};

function aMember(number: number, name: string, roles: Role[]): Member {
  return {
    id: anId(number),
    revision: 2,
    person: { id: anId(number + 100), name },
    email: `${name.toLowerCase().replace(' ', '.')}@example.test`,
    roles,
    joinedAt: '2026-10-01T10:00:00.000Z',
  };
}
const MEMBERS = [aMember(1, 'Bar manager', ['manager']), aMember(2, 'Bar developer', ['developer'])];

let unmount = () => {};
afterEach(() => {
  unmount();
  vi.unstubAllGlobals();
});

type Answers = Record<string, FakeAnswer | ((sent: SentRequest) => FakeAnswer)>;

/** Opens the page; `answers` are by method and path within the team, over a team where all is well. */
async function openTeam(answers: Answers = {}, roles: Role[] = ['manager']) {
  const account: Account = {
    id: anId(101),
    email: 'manager@example.test',
    name: 'Bar manager',
    teams: [{ teamId: TEAM_ID, teamName: TEAM.name, roles }],
  };
  const all: Answers = {
    'GET /auth/me': { status: 200, body: account },
    'GET ': { status: 200, body: TEAM },
    'GET /members': { status: 200, body: { items: MEMBERS } },
    'GET /invitations': { status: 200, body: { items: [] } },
    ...answers,
  };
  const sent = fakeApi((request) => {
    const answer = all[`${request.method} ${request.path.replace(`/teams/${TEAM_ID}`, '')}`];
    if (answer === undefined) throw new Error(`not foreseen: ${request.method} ${request.path}`);
    return typeof answer === 'function' ? answer(request) : answer;
  });
  const mounted = await mountPage({
    page: TeamPage,
    props: { teamId: TEAM_ID },
    prepare: async () => {
      await useSessionStore().ensure();
      await useTeamStore().open(TEAM_ID);
    },
  });
  unmount = mounted.unmount;
  return sent;
}

async function press(button: string | RegExp) {
  byRole(document.body, 'button', button).click();
  await flushPromises();
}

function check(label: string) {
  byRole(document.body, 'checkbox', label).click();
}

describe('the page of a team', () => {
  it('offers a bartender nothing to change and asks for no invitations', async () => {
    const sent = await openTeam({}, ['bartender']);
    byRole(document.body, 'row', /Bar developer/);
    expect(allByRole(document.body, 'button', /Invite|Roles of|Remove|Save/)).toHaveLength(0);
    expect(fieldNamed(document.body, 'Name').disabled).toBe(true);
    expect(sent.some(({ path }) => path.endsWith('/invitations'))).toBe(false);
  });

  it('says what each role may do', async () => {
    await openTeam();
    expect(textOf(document.body)).toMatch(/menu writer Signs and locks versions/);
  });

  it('does not show a failed list of members as an empty one', async () => {
    await openTeam({ 'GET /members': 'no network' });
    expect(textOf(byRole(document.body, 'alert'))).toContain('No answer from the server');
    expect(allByRole(document.body, 'table', 'Members')).toHaveLength(0);
  });
});

describe('an invitation', () => {
  it('is made for somebody and shows its link once', async () => {
    const invitation = {
      id: anId(50),
      label: 'Friday colleague',
      roles: ['bartender', 'trainer'],
      createdAt: '2026-12-01T10:00:00.000Z',
      expiresAt: '2026-12-08T10:00:00.000Z',
      createdBy: null,
    };
    const sent = await openTeam({
      'POST /invitations': { status: 201, body: { invitation, token: 'token-of-the-link-0123456789' } },
    });
    await press('Invite somebody');
    await press('Make the link');
    expect(fieldNamed(document.body, 'Whom the link is for').getAttribute('aria-invalid')).toBe('true');
    expect(sent.some(({ method }) => method === 'POST')).toBe(false);

    typeInto(fieldNamed(document.body, 'Whom the link is for'), 'Friday colleague');
    check('trainer');
    await press('Make the link');
    expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
      label: 'Friday colleague',
      roles: ['trainer', 'bartender'],
    });
    expect(fieldNamed(document.body, 'Link').value).toMatch(/\/invitation\/token-of-the-link-0123456789$/);

    await press('Done');
    expect(document.body.innerHTML).not.toContain('token-of-the-link');
  });
});

describe('the roles of a member', () => {
  it('are not emptied', async () => {
    const sent = await openTeam();
    await press('Roles of Bar developer');
    check('developer');
    await press('Save');
    expect(textOf(byRole(document.body, 'dialog'))).toContain('at least one role');
    expect(sent.some(({ method }) => method === 'PUT')).toBe(false);
  });

  it('changed by somebody else meanwhile are shown before they are overwritten', async () => {
    const theirs: Member = { ...aMember(2, 'Bar developer', ['trainer']), revision: 9 };
    let isStale = true;
    const sent = await openTeam({
      [`PUT /members/${anId(2)}`]: () =>
        isStale
          ? aProblem('stale-version', 412, { currentRevision: 9, current: theirs })
          : { status: 200, body: theirs },
    });
    await press('Roles of Bar developer');
    check('bartender');
    await press('Save');
    expect(textOf(byRole(document.body, 'dialog'))).toContain('Saved meanwhile: trainer');

    isStale = false;
    await press('Save these roles instead');
    const puts = sent.filter(({ method }) => method === 'PUT');
    expect(puts.map(({ headers }) => headers.get('if-match'))).toEqual(['"2"', '"9"']);
    expect(puts[1]?.body).toEqual({ roles: ['developer', 'bartender'] });
  });
});

describe('removing a member', () => {
  it("is asked about first, and the server's refusal is shown", async () => {
    const detail = 'A team keeps at least one manager.';
    const sent = await openTeam({ [`DELETE /members/${anId(1)}`]: aProblem('in-use', 409, { detail }) });
    await press('Remove Bar manager');
    await press('Cancel');
    expect(sent.some(({ method }) => method === 'DELETE')).toBe(false);

    await press('Remove Bar manager');
    await press('Remove');
    expect(sent.find(({ method }) => method === 'DELETE')?.headers.get('if-match')).toBe('"2"');
    expect(textOf(byRole(document.body, 'alert'))).toContain(detail);
  });
});

describe('the settings', () => {
  it('are saved whole, a decimal comma read as a point', async () => {
    const sent = await openTeam({
      'PUT ': ({ body }) => ({ status: 200, body: { ...TEAM, ...(body as Team), revision: 4 } }),
    });
    typeInto(fieldNamed(document.body, 'One dash'), '0,9');
    typeInto(fieldNamed(document.body, 'Currency of prices'), 'eur');
    await flushPromises();
    await press('Save the settings');
    const put = sent.find(({ method }) => method === 'PUT');
    expect(put?.headers.get('if-match')).toBe('"3"');
    expect(put?.body).toEqual({
      name: 'The Gannet Room',
      country: 'GB',
      currency: 'EUR',
      houseMeasures: { dashMl: 0.9, barSpoonMl: 5, dropMl: 0.05 },
    });
    expect(useTeamStore().houseMeasures.dashMl).toBe(0.9);
  });

  it('are not sent with a measure that cannot be read', async () => {
    const sent = await openTeam();
    typeInto(fieldNamed(document.body, 'One dash'), 'a lot');
    await flushPromises();
    await press('Save the settings');
    expect(sent.some(({ method }) => method === 'PUT')).toBe(false);
    expect(fieldNamed(document.body, 'One dash').getAttribute('aria-invalid')).toBe('true');
  });

  it('saved by somebody else meanwhile lose nothing of either', async () => {
    const theirs: Team = { ...TEAM, revision: 8, name: 'The Gannet Room & Terrace' };
    await openTeam({ 'PUT ': aProblem('stale-version', 412, { currentRevision: 8, current: theirs }) });
    typeInto(fieldNamed(document.body, 'One dash'), '1');
    await flushPromises();
    await press('Save the settings');
    expect(textOf(byRole(document.body, 'alert'))).toContain('The Gannet Room & Terrace');
    expect(fieldNamed(document.body, 'One dash').value).toBe('1');
    await press('take what was saved');
    expect(fieldNamed(document.body, 'Name').value).toBe('The Gannet Room & Terrace');
    expect(fieldNamed(document.body, 'One dash').value).toBe('0.8');
  });
});
