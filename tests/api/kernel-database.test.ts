import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import type { ApiClient } from '#tests/support/client.ts';
import { createTestDatabase } from '#tests/support/database.ts';

describe('without a database', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startTestApp({ databaseUrl: 'postgres://nobody@127.0.0.1:1/nowhere' });
  });
  afterAll(() => app.stop());

  const withSession = () => {
    const client = app.stranger();
    client.cookie = `oxymel_session=${'a'.repeat(40)}`;
    return client;
  };

  it.each<[string, () => ReturnType<ApiClient['get']>]>([
    ['the health of the server', () => app.stranger().get('/health')],
    ['the account', () => withSession().get('/auth/me')],
    ['signing in', () => app.stranger().post('/auth/sign-in', { email: 'a@example.test', password: 'x' })],
    ['signing out', () => withSession().post('/auth/sign-out')],
  ])('%s is unavailable, not a fault of the server', async (_title, call) => {
    const { problem, text } = await call();
    expect(problem).toMatchObject({ name: 'unavailable', status: 503 });
    expect(text).not.toMatch(/127\.0\.0\.1|ECONN|nowhere/);
  });
});

describe('a database that goes away', () => {
  it('is unavailable when it was removed under the server', async () => {
    const database = await createTestDatabase();
    const app = await startTestApp({ databaseUrl: database.databaseUrl });
    expect((await app.stranger().get('/health')).status).toBe(200);
    await database.drop();
    const answers = [await app.stranger().get('/health'), await app.stranger().get('/health')];
    expect(answers.map(({ status }) => status)).toEqual([503, 503]);
    await app.stop();
  });

  it('is used again when it is back', async () => {
    const app = await startTestApp();
    const team = await app.addTeam();
    await app.orm.em
      .getConnection()
      .execute(
        'select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and pid <> pg_backend_pid()',
      );
    const first = await team.as('bartender').get(`/teams/${team.id}`);
    expect([200, 503]).toContain(first.status);
    expect((await team.as('bartender').get(`/teams/${team.id}`)).status).toBe(200);
    await app.stop();
  });
});
