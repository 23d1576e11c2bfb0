import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import type { GlassList } from '#shared/contracts/glass.ts';
import type { IngredientPage } from '#shared/contracts/ingredient.ts';

import { Session, User } from '#server/modules/accounts/account.entity.ts';

import { TEST_PASSWORD, type TestApp, startTestApp } from '#tests/support/app.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

const PASSWORD = 'a long enough password';
const aSignUp = (changes: Record<string, unknown> = {}) => ({
  email: 'wren@example.test',
  name: 'Wren',
  password: PASSWORD,
  ...changes,
});

const signIn = (email: string, password: string) =>
  app.stranger().post<Account>('/auth/sign-in', { email, password });
const countUsers = () => app.orm.em.fork().count(User);

describe('signing up', () => {
  it('makes an account and a first team with the generic back bar and glasses, whose manager one is', async () => {
    const client = app.stranger();
    const email = 'Gull@Example.test';
    await client.post('/auth/sign-up', aSignUp({ email, name: '  Gull ', teamName: 'The Gannet Room' }));
    expect(client.cookie, 'no session before the sign-in').toBe('');

    const { body } = await client.post<Account>('/auth/sign-in', {
      email: 'gULL@example.test',
      password: PASSWORD,
    });
    expect(body).toMatchObject({ email: 'gull@example.test', name: 'Gull' });
    expect(body.teams).toMatchObject([{ teamName: 'The Gannet Room', roles: ['manager'] }]);
    const team = `/teams/${body.teams[0]?.teamId}`;
    expect((await client.get<IngredientPage>(`${team}/ingredients`)).body.items.length).toBeGreaterThan(40);
    expect((await client.get<GlassList>(`${team}/glasses`)).body.items.length).toBeGreaterThanOrEqual(8);
  });

  it('may leave the team for later', async () => {
    await app.stranger().post('/auth/sign-up', aSignUp({ email: 'tern@example.test' }));
    expect((await signIn('tern@example.test', PASSWORD)).body.teams).toEqual([]);
  });

  it('answers for a known address as for a new one, and changes nothing of it', async () => {
    const body = aSignUp({ email: 'auk@example.test', teamName: 'First' });
    const fresh = await app.stranger().post('/auth/sign-up', body);
    const users = await countUsers();
    const again = await app.stranger().post('/auth/sign-up', {
      ...body,
      email: 'AUK@example.test',
      name: 'Thief',
      password: 'another password',
    });

    expect([again.status, again.text]).toEqual([fresh.status, fresh.text]);
    expect(namesOf(again.headers)).toEqual(namesOf(fresh.headers));
    expect(await countUsers()).toBe(users);
    expect((await signIn('auk@example.test', 'another password')).status).toBe(401);
    const account = (await signIn('auk@example.test', PASSWORD)).body;
    expect(account.name).toBe('Wren');
    expect(account.teams).toHaveLength(1);
  });

  it('of one address by two people at once makes one account, and neither is told', async () => {
    const body = aSignUp({ email: 'skua@example.test', teamName: 'Skua' });
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => app.stranger().post('/auth/sign-up', body)),
    );
    expect(answers.map(({ status }) => status)).toEqual([202, 202, 202, 202, 202]);
    expect(await app.orm.em.fork().count(User, { email: 'skua@example.test' })).toBe(1);
    expect((await signIn('skua@example.test', PASSWORD)).body.teams).toHaveLength(1);
  });

  it.each([
    [{ email: 'not an address' }, '#/email format'],
    [{ email: `${'x'.repeat(250)}@example.test` }, '#/email maxLength'],
    [{ password: 'too short' }, '#/password minLength'],
    [{ password: 'x'.repeat(201) }, '#/password maxLength'],
    [{ name: ' ' }, '#/name pattern'],
    [{ name: 'two\nlines' }, '#/name pattern'],
    [{ teamName: '' }, '#/teamName minLength'],
    [{ isAdmin: true }, '#/isAdmin additionalProperties'],
  ])('with %j is told at the field', async (changes, error) => {
    const users = await countUsers();
    const answer = await app.stranger().post('/auth/sign-up', aSignUp(changes));
    expect(answer.fieldErrors).toContain(error);
    expect(answer.text, 'a password is never repeated').not.toContain('too short');
    expect(await countUsers()).toBe(users);
  });

  it('keeps the password as an argon2id hash only', async () => {
    await app.stranger().post('/auth/sign-up', aSignUp({ email: 'shag@example.test' }));
    const user = await app.orm.em.fork().findOneOrFail(User, { email: 'shag@example.test' });
    expect(user.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(JSON.stringify(user)).not.toContain('argon2');
  });
});

describe('signing in', () => {
  it('starts a session in a cookie that scripts and other sites do not get', async () => {
    const { email, name, id } = await app.addPerson({ name: 'Petrel' });
    const answer = await signIn(email, TEST_PASSWORD);
    expect(answer.body).toEqual({ id, email, name, teams: [] });
    const cookie = String(answer.headers['set-cookie']);
    expect(cookie).toMatch(/^oxymel_session=[a-z0-9]{30,};/);
    expect(cookie).toContain('HttpOnly');
    expect(cookie).toContain('SameSite=Lax');
    expect(cookie).toContain('Path=/');
    expect(cookie, 'plain http').not.toContain('Secure');
  });

  it('keeps only the hash of the cookie', async () => {
    const { client } = await app.addPerson();
    const value = client.cookie.split('=')[1] ?? '';
    expect(await app.orm.em.fork().count(Session, { id: value })).toBe(0);
    expect((await client.get('/auth/me')).status).toBe(200);
    const [row] = await app.orm.em.fork().find(Session, {}, { limit: 1 });
    const thief = app.stranger();
    thief.cookie = `oxymel_session=${row?.id}`;
    expect((await thief.get('/auth/me')).status, 'what a reader of the table has is no session').toBe(401);
  });

  it('answers a wrong password and an unknown address in the same words', async () => {
    const { email } = await app.addPerson();
    const wrong = await signIn(email, 'not the password');
    const unknown = await signIn('nobody@example.test', 'not the password');
    expect(wrong.problem.name).toBe('wrong-credentials');
    expect({ ...unknown.problem, instance: '' }).toEqual({ ...wrong.problem, instance: '' });
    expect(namesOf(unknown.headers)).toEqual(namesOf(wrong.headers));
  });

  it('begins a new session each time and ends the one it replaces', async () => {
    const { email, client } = await app.addPerson();
    const before = client.cookie;
    await client.post('/auth/sign-in', { email, password: TEST_PASSWORD });
    expect(client.cookie).not.toBe(before);
    const old = app.stranger();
    old.cookie = before;
    expect((await old.get('/auth/me')).status).toBe(401);
    expect((await client.get('/auth/me')).status).toBe(200);
  });

  it('does not take a session id that the browser chose', async () => {
    const { email } = await app.addPerson();
    const client = app.stranger();
    client.cookie = `oxymel_session=${'f'.repeat(40)}`;
    await client.post('/auth/sign-in', { email, password: TEST_PASSWORD });
    expect(client.cookie).not.toContain('ffff');
  });

  it('knows a password however its letters were composed', async () => {
    await app
      .stranger()
      .post('/auth/sign-up', aSignUp({ email: 'a@example.test', password: 'cre\u0300me de peche' }));
    expect((await signIn('a@example.test', 'cr\u00e8me de peche')).status).toBe(200);
  });

  it('clears away sessions that have passed', async () => {
    const passed = await app.addPerson();
    const { email } = await app.addPerson();
    await app.orm.em
      .fork()
      .nativeUpdate(Session, { user: passed.id }, { expiresAt: new Date(Date.now() - 1000) });
    await signIn(email, TEST_PASSWORD);
    expect(await app.orm.em.fork().count(Session, { user: passed.id })).toBe(0);
  });
});

describe('a session', () => {
  it('that has passed is over, and its cookie is cleared', async () => {
    const { id, client } = await app.addPerson();
    await app.orm.em.fork().nativeUpdate(Session, { user: id }, { expiresAt: new Date(Date.now() - 1000) });
    expect((await client.get('/auth/me')).problem.name).toBe('unauthenticated');
    expect(client.cookie).toBe('');
  });

  it('in use is prolonged when half of its time is over', async () => {
    const { id, client } = await app.addPerson();
    const inTenDays = new Date(Date.now() + 10 * 86_400_000);
    await app.orm.em.fork().nativeUpdate(Session, { user: id }, { expiresAt: inTenDays });
    const answer = await client.get('/auth/me');
    expect(String(answer.headers['set-cookie'])).toContain('Max-Age=2592000');
    const { expiresAt } = await app.orm.em.fork().findOneOrFail(Session, { user: id });
    expect(expiresAt.getTime()).toBeGreaterThan(Date.now() + 29 * 86_400_000);
  });

  it('ends with signing out, here and not elsewhere', async () => {
    const { email, client } = await app.addPerson();
    const elsewhere = app.stranger();
    await elsewhere.post('/auth/sign-in', { email, password: TEST_PASSWORD });
    const cookie = client.cookie;
    await client.post('/auth/sign-out');
    expect(client.cookie).toBe('');
    client.cookie = cookie;
    expect((await client.get('/auth/me')).status).toBe(401);
    expect((await elsewhere.get('/auth/me')).status).toBe(200);
  });

  it('may be signed out twice', async () => {
    const client = app.stranger();
    expect((await client.post('/auth/sign-out')).status).toBe(204);
    expect((await client.post('/auth/sign-out')).status).toBe(204);
  });
});

describe('changing the password', () => {
  const NEW_PASSWORD = 'an even longer password';

  it('ends every other session and keeps this one', async () => {
    const { email, client } = await app.addPerson();
    const elsewhere = app.stranger();
    await elsewhere.post('/auth/sign-in', { email, password: TEST_PASSWORD });
    const bystander = await app.addPerson();

    const body = { currentPassword: TEST_PASSWORD, newPassword: NEW_PASSWORD };
    expect((await client.post('/auth/password', body)).status).toBe(204);

    expect((await client.get('/auth/me')).status).toBe(200);
    expect((await elsewhere.get('/auth/me')).status).toBe(401);
    expect((await bystander.client.get('/auth/me')).status).toBe(200);
    expect((await signIn(email, TEST_PASSWORD)).status).toBe(401);
    expect((await signIn(email, NEW_PASSWORD)).status).toBe(200);
  });

  it('with a wrong present password is told at the field and changes nothing', async () => {
    const { email, client } = await app.addPerson();
    const body = { currentPassword: 'not the password', newPassword: NEW_PASSWORD };
    const answer = await client.post('/auth/password', body);
    expect(answer.fieldErrors).toEqual(['#/currentPassword wrong']);
    expect((await signIn(email, TEST_PASSWORD)).status).toBe(200);
  });

  it('to one that is too short is told at the field', async () => {
    const { client } = await app.addPerson();
    const body = { currentPassword: TEST_PASSWORD, newPassword: 'short' };
    expect((await client.post('/auth/password', body)).fieldErrors).toEqual(['#/newPassword minLength']);
  });
});

function namesOf(headers: Record<string, string>): string[] {
  return Object.keys(headers).sort();
}
