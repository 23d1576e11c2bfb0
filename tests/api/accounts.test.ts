import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

const NEW_PERSON = { email: 'Wren@Example.test', name: 'Wren', password: 'a long enough password' };

describe('signing up', () => {
  it('makes an account with a first team, whose manager the person is', async () => {
    const client = app.stranger();
    const answer = await client.post('/auth/sign-up', { ...NEW_PERSON, teamName: 'The Gannet Room' });
    expect(answer.body).toEqual({ next: 'sign-in' });

    const account = await client.post<Account>('/auth/sign-in', {
      email: 'wREN@example.test',
      password: NEW_PERSON.password,
    });
    expect(account.body).toMatchObject({ email: 'wren@example.test', name: 'Wren' });
    expect(account.body.teams).toMatchObject([{ teamName: 'The Gannet Room', roles: ['manager'] }]);
  });
});
