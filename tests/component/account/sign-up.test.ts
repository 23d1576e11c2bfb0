import { flushPromises } from '@vue/test-utils';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Component } from 'vue';

import type { Account } from '#shared/contracts/account.ts';
import InvitationPage from '#src/pages/account/InvitationPage.vue';
import SignUpPage from '#src/pages/account/SignUpPage.vue';
import { useSessionStore } from '#src/stores/session.ts';
import { allByRole, byRole, fieldNamed, textOf, typeInto } from '#tests/support/by-role.ts';
import { anId } from '#tests/support/builders.ts';
import { type FakeAnswer, type SentRequest, aProblem, fakeApi } from '#tests/support/fake-api.ts';
import { mountPage } from '#tests/support/mount-app.ts';

const TEAM = anId(7);
const TOKEN = 'abcdefghijklmnopqrstuvwx';
const STRANGER: Account = { id: anId(1), email: 'new@example.test', name: 'Newcomer', teams: [] };
const MEMBER: Account = {
  ...STRANGER,
  teams: [{ teamId: TEAM, teamName: 'The Gannet Room', roles: ['bartender'] }],
};

let unmount = () => {};
afterEach(() => {
  unmount();
  vi.unstubAllGlobals();
});

function fillIn(fields: Record<string, string>) {
  for (const [label, text] of Object.entries(fields)) typeInto(fieldNamed(document.body, label), text);
}

async function press(button: string) {
  byRole(document.body, 'button', button).click();
  await flushPromises();
}

async function open(
  page: Component,
  answer: (sent: SentRequest) => FakeAnswer,
  props: Record<string, unknown>,
) {
  const sent = fakeApi(answer);
  const mounted = await mountPage({ page, props });
  unmount = mounted.unmount;
  return { sent, router: mounted.router };
}

const PERSON = { 'Your name': 'Newcomer', 'E-mail': 'new@example.test', Password: 'four words in a row' };

describe('signing up', () => {
  it('makes the account with its first team and signs in with the same credentials', async () => {
    const { sent, router } = await open(
      SignUpPage,
      ({ path }) =>
        path === '/auth/sign-up' ? { status: 202, body: { next: 'sign-in' } } : { status: 200, body: MEMBER },
      { returnTo: null },
    );
    fillIn({ ...PERSON, Team: ' The Gannet Room ' });
    await press('Sign up');
    expect(sent.map(({ path, body }) => [path, body])).toEqual([
      [
        '/auth/sign-up',
        {
          name: 'Newcomer',
          email: 'new@example.test',
          password: 'four words in a row',
          teamName: 'The Gannet Room',
        },
      ],
      ['/auth/sign-in', { email: 'new@example.test', password: 'four words in a row' }],
    ]);
    expect(router.currentRoute.value.name).toBe('home');
  });

  it('marks what is missing or too short before anything is sent', async () => {
    const { sent } = await open(SignUpPage, () => ({ status: 500 }), { returnTo: null });
    fillIn({ Password: 'nine char' });
    await press('Sign up');
    expect(sent).toHaveLength(0);
    for (const label of ['Your name', 'E-mail', 'Password', 'Team']) {
      expect(fieldNamed(document.body, label).getAttribute('aria-invalid'), label).toBe('true');
    }
    expect(textOf(document.body)).toContain('10 characters or more');
  });

  it('does not say whether the address had an account when the password does not open it', async () => {
    const { router } = await open(
      SignUpPage,
      ({ path }) =>
        path === '/auth/sign-up'
          ? { status: 202, body: { next: 'sign-in' } }
          : aProblem('wrong-credentials', 401),
      { returnTo: null },
    );
    fillIn({ ...PERSON, Team: 'The Gannet Room' });
    await press('Sign up');
    expect(textOf(byRole(document.body, 'alert'))).toMatch(
      /If this address is new here.*If it had an account before/,
    );
    expect(router.currentRoute.value.path).toBe('/page');
  });
});

describe('an invitation', () => {
  const preview = {
    teamName: 'The Gannet Room',
    roles: ['menu-writer'],
    expiresAt: '2026-12-08T10:00:00.000Z',
    invitedBy: 'Bar manager',
  };

  it('is accepted by somebody who is signed in, and leads into the team', async () => {
    const { sent, router } = await open(
      InvitationPage,
      ({ path }) => ({
        status: 200,
        body: path === '/auth/me' ? STRANGER : path.endsWith('/accept') ? MEMBER : preview,
      }),
      { token: TOKEN },
    );
    expect(textOf(document.body)).toContain('Bar manager invites you as menu writer');
    await press('Join the team');
    expect(sent.at(-1)).toMatchObject({ method: 'POST', path: `/invitations/${TOKEN}/accept` });
    expect(router.currentRoute.value.fullPath).toBe(`/t/${TEAM}/specs`);
  });

  it('is taken with a new account, which asks for no team name', async () => {
    const { sent, router } = await open(
      InvitationPage,
      ({ path }) => {
        if (path === '/auth/me') return aProblem('unauthenticated', 401);
        if (path === '/auth/sign-up') return { status: 202, body: { next: 'sign-in' } };
        return { status: 200, body: path === '/auth/sign-in' ? MEMBER : preview };
      },
      { token: TOKEN },
    );
    expect(allByRole(document.body, 'textbox', 'Team')).toHaveLength(0);
    fillIn(PERSON);
    await press('Sign up and join');
    expect(sent.find(({ path }) => path === '/auth/sign-up')?.body).toMatchObject({ invitationToken: TOKEN });
    expect(useSessionStore().account).toEqual(MEMBER);
    expect(router.currentRoute.value.fullPath).toBe(`/t/${TEAM}/specs`);
  });

  it('that no longer works says so and offers no form', async () => {
    await open(
      InvitationPage,
      ({ path }) => (path === '/auth/me' ? aProblem('unauthenticated', 401) : aProblem('not-found', 404)),
      { token: TOKEN },
    );
    byRole(document.body, 'heading', 'This link no longer works');
    expect(allByRole(document.body, 'textbox')).toHaveLength(0);
  });

  it('that could not be fetched is not called dead', async () => {
    await open(
      InvitationPage,
      ({ path }) => (path === '/auth/me' ? aProblem('unauthenticated', 401) : 'no network'),
      { token: TOKEN },
    );
    expect(textOf(document.body)).not.toContain('no longer works');
    byRole(document.body, 'button', 'Try again');
  });
});
