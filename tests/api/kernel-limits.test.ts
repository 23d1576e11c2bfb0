import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { TEST_PASSWORD, type TestApp, startTestApp } from '#tests/support/app.ts';
import type { Answer } from '#tests/support/client.ts';

/** Two servers behind a balancer, on one database. */
let first: TestApp;
let second: TestApp;
beforeAll(async () => {
  first = await startTestApp({ config: { rateLimitFactor: 1 } });
  second = await startTestApp({ databaseUrl: first.databaseUrl, config: { rateLimitFactor: 1 } });
});
beforeEach(async () => {
  await first.orm.em.getConnection().execute('delete from rate_limit_window');
});
afterAll(async () => {
  await second.stop();
  await first.stop();
});

/** Signs in so many times, at either server in turn. */
async function signIns(times: number, email: (n: number) => string, password = 'not the password') {
  const answers: Answer<unknown>[] = [];
  for (let n = 0; n < times; n += 1) {
    const app = n % 2 === 0 ? first : second;
    answers.push(await app.stranger().post('/auth/sign-in', { email: email(n), password }));
  }
  return answers.map(({ status }) => status);
}

describe('limits of sign-in', () => {
  it('let an address be tried ten times, over all servers together', async () => {
    const statuses = await signIns(11, () => 'gull@example.test');
    expect(statuses).toEqual([...Array<number>(10).fill(401), 429]);
  });

  it('say when to try again, in the header and in the body', async () => {
    await signIns(10, () => 'tern@example.test');
    const answer = await second
      .stranger()
      .post('/auth/sign-in', { email: 'Tern@Example.test', password: 'another' });
    expect(answer.problem.name).toBe('too-many-requests');
    const seconds = Number(answer.headers['retry-after']);
    expect(seconds).toBeGreaterThan(800);
    expect(seconds).toBeLessThanOrEqual(900);
    expect(answer.problem.retryAfterSeconds).toBe(seconds);
  });

  it('leave other addresses alone, until the caller has tried thirty times', async () => {
    const statuses = await signIns(31, (n) => `bird${n}@example.test`);
    expect(statuses).toEqual([...Array<number>(30).fill(401), 429]);
  });

  it('hold against the right password too', async () => {
    const { email } = await first.addPerson();
    await signIns(10, () => email);
    expect(await signIns(1, () => email, TEST_PASSWORD)).toEqual([429]);
  });

  it('are over when their time has passed', async () => {
    await signIns(11, () => 'auk@example.test');
    await first.orm.em
      .getConnection()
      .execute("update rate_limit_window set resets_at = now() - interval '1 second'");
    expect(await signIns(1, () => 'auk@example.test')).toEqual([401]);
  });

  it('keep no address in the database', async () => {
    await signIns(1, () => 'puffin@example.test');
    const rows = await first.orm.em
      .getConnection()
      .execute<{ key: string }[]>('select key from rate_limit_window');
    expect(rows).toHaveLength(2);
    for (const { key } of rows) expect(key).toMatch(/^sign-in(-address)?:[0-9a-f]{64}$/);
  });

  it('are cleared away by the next sign-in, once passed', async () => {
    await signIns(1, () => 'shag@example.test');
    await first.orm.em
      .getConnection()
      .execute("update rate_limit_window set resets_at = now() - interval '1 hour'");
    const { email } = await first.addPerson();
    expect(await signIns(1, () => email, TEST_PASSWORD)).toEqual([200]);
    const rows = await first.orm.em
      .getConnection()
      .execute('select 1 from rate_limit_window where resets_at < now()');
    expect(rows).toEqual([]);
  });
});

describe('limits of other routes', () => {
  it('let twenty accounts be made in an hour', async () => {
    const statuses: number[] = [];
    for (let n = 0; n < 21; n += 1) {
      const body = { email: `new${n}@example.test`, name: 'New', password: 'a long enough password' };
      statuses.push((await (n % 2 ? first : second).stranger().post('/auth/sign-up', body)).status);
    }
    expect(statuses).toEqual([...Array<number>(20).fill(202), 429]);
  });

  it('let sixty invitation tokens be tried', async () => {
    const statuses = new Set<number>();
    for (let n = 0; n < 60; n += 1) {
      statuses.add((await first.stranger().get(`/invitations/${String(n).padStart(43, 'x')}`)).status);
    }
    expect([...statuses]).toEqual([404]);
    expect((await second.stranger().get(`/invitations/${'x'.repeat(43)}`)).status).toBe(429);
  });

  it('count each route of its own', async () => {
    await signIns(11, () => 'gull@example.test');
    expect((await first.stranger().get('/health')).status).toBe(200);
    const body = { email: 'gull@example.test', name: 'Gull', password: 'a long enough password' };
    expect((await first.stranger().post('/auth/sign-up', body)).status).toBe(202);
  });
});
