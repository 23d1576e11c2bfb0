import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Writable } from 'node:stream';

import { pino } from 'pino';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { PROBLEM_NAMES } from '#shared/contracts/problem.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';

/** A build in a folder whose name begins with a dot, as a checkout may stand in one. */
const folder = mkdtempSync(join(tmpdir(), 'oxymel-web-'));
const webRoot = join(folder, '.checkout', 'web');
let app: TestApp;
let log = '';

beforeAll(async () => {
  mkdirSync(join(webRoot, 'assets'), { recursive: true });
  writeFileSync(join(webRoot, 'index.html'), '<title>the client</title>');
  writeFileSync(join(webRoot, 'assets', 'main-abc123.js'), 'export {};');
  writeFileSync(join(folder, 'secret.txt'), 'not for the web');
  const destination = new Writable({
    write(chunk: Buffer, _encoding, done) {
      log += chunk.toString();
      done();
    },
  });
  const logger = pino({ level: 'debug', redact: ['req.headers.cookie'] }, destination);
  app = await startTestApp({ config: { webRoot }, replace: { logger } });
});
afterAll(async () => {
  await app.stop();
  rmSync(folder, { recursive: true });
});

const get = (path: string) => supertest(app.baseUrl).get(path);

describe('the built client', () => {
  it.each(['/', '/t/some-team/specs', '/invitation/some.token', '/api-of-something-else'])(
    'is served at %s, and asked for anew each time',
    async (path) => {
      const answer = await get(path);
      expect(answer.status).toBe(200);
      expect(answer.text).toContain('the client');
      expect(answer.headers).toMatchObject({ 'cache-control': 'no-cache' });
      expect(answer.headers['content-security-policy']).toContain("default-src 'self'");
    },
  );

  it('keeps its hashed assets for a year', async () => {
    const answer = await get('/assets/main-abc123.js');
    expect(answer.headers['cache-control']).toBe('public, max-age=31536000, immutable');
  });

  it('has no page in the place of an asset that is gone, so that an old page fails loudly', async () => {
    const answer = await get('/assets/main-old.js');
    expect(answer.status).toBe(404);
    expect(answer.body).toMatchObject({ name: 'not-found' });
  });

  it.each([
    '/../secret.txt',
    '/..%2f..%2fsecret.txt',
    '/assets/..%2f..%2f..%2fsecret.txt',
    '/%2e%2e/%2e%2e/secret.txt',
    '/assets/%00',
    '/%E0%A4%A',
  ])('gives nothing from outside its folder at %s', async (path) => {
    const answer = await get(path);
    expect(answer.status).toBeLessThan(500);
    expect(answer.text).not.toContain('not for the web');
  });

  it('that was never built is not found, and no fault of the server', async () => {
    const bare = await startTestApp({ databaseUrl: app.databaseUrl });
    const answer = await supertest(bare.baseUrl).get('/');
    expect(answer.status).toBe(404);
    await bare.stop();
  });
});

describe('the address in the type of a problem', () => {
  it.each(PROBLEM_NAMES)('%s leads to what it means, as plain text', async (name) => {
    const answer = await get(`/problems/${name}`);
    expect(answer.status).toBe(200);
    expect(answer.headers['content-type']).toBe('text/plain; charset=utf-8');
    expect(answer.text).toContain(`/problems/${name}`);
  });
});

describe('the log', () => {
  it('names each request by the id that its answer carries', async () => {
    const answer = await get('/api/health');
    expect(log).toContain(String(answer.headers['x-request-id']));
  });

  it('holds no session and no link into a team', async () => {
    const { client } = await app.addPerson();
    const token = 'a-secret-token-of-an-invitation-0123456789';
    await client.get(`/invitations/${token}`);
    await client.post(`/invitations/${token}/accept`);
    await get(`/invitation/${token}`);
    expect(log).toContain('/invitations/…');
    expect(log).not.toContain(token);
    expect(log).not.toContain(client.cookie.split('=')[1]);
  });

  it('holds no password', async () => {
    await app.stranger().post('/auth/sign-in', { email: 'gull@example.test', password: 'hunter2hunter2' });
    expect(log).toContain('/api/auth/sign-in');
    expect(log).not.toContain('hunter2');
  });
});
