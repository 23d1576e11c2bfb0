import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Team } from '#shared/contracts/team.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';
import type { ApiClient } from '#tests/support/client.ts';

let app: TestApp;
let team: TestTeam;
let manager: ApiClient;
beforeAll(async () => {
  app = await startTestApp({ config: { publicOrigins: ['specs.example.test'] } });
  team = await app.addTeam();
  manager = team.as('manager');
});
afterAll(() => app.stop());

const TEAM_CHANGE = {
  name: 'The Gannet Room',
  country: 'GB',
  currency: 'GBP',
  houseMeasures: { dashMl: 0.8, barSpoonMl: 5, dropMl: 0.05 },
};

const createTeamWith = (body: unknown, headers?: Record<string, string>) =>
  manager.post('/teams', body, headers === undefined ? {} : { headers });

describe('a body', () => {
  it.each([
    ['cut off', '{"name": "Gan'],
    ['no JSON at all', 'name=Gannet'],
    ['two documents', '{} {}'],
    ['a trailing comma', '{"name": "Gannet",}'],
  ])('that is %s is malformed', async (_title, text) => {
    const answer = await createTeamWith(text);
    expect(answer.problem).toMatchObject({ name: 'malformed-request', status: 400 });
    expect(answer.text).not.toContain('Unexpected');
  });

  it('of 5 MB is too large, and the server answers on', async () => {
    const answer = await createTeamWith(JSON.stringify({ name: 'x'.repeat(5_000_000) }));
    expect(answer.problem).toMatchObject({ name: 'payload-too-large', status: 413 });
    expect(answer.problem.detail).toContain('256 kB');
    expect((await manager.get('/health')).status).toBe(200);
  });

  it('of 5 MB from a stranger is not looked at', async () => {
    const answer = await app.stranger().post('/teams', JSON.stringify({ name: 'x'.repeat(5_000_000) }));
    expect(answer.status).toBe(401);
  });

  it.each([
    ['text/plain', '{"name":"Gannet"}'],
    ['application/x-www-form-urlencoded', 'name=Gannet'],
    ['multipart/form-data; boundary=x', '--x--'],
    ['application/json; charset=koi8-r', '{"name":"Gannet"}'],
  ])('sent as %s is refused as no JSON', async (contentType, text) => {
    const answer = await createTeamWith(text, { 'Content-Type': contentType });
    expect(answer.problem).toMatchObject({ name: 'unsupported-media-type', status: 415 });
  });

  it('with an unknown compression is refused', async () => {
    const answer = await createTeamWith('{"name":"Gannet"}', { 'Content-Encoding': 'zstd-x' });
    expect(answer.problem.name).toBe('unsupported-media-type');
  });

  it('that is missing is refused as no JSON', async () => {
    expect((await manager.post('/teams')).status).toBe(415);
  });

  it.each([['null'], ['[]'], ['"Gannet"'], ['17'], ['{}']])(
    'that is %s is told what is missing',
    async (text) => {
      const answer = await createTeamWith(text);
      expect(answer.problem.name).toBe('invalid-fields');
      expect(answer.fieldErrors).toEqual([text === '{}' ? '#/name required' : '# type']);
    },
  );

  it('with an unknown member is told which', async () => {
    const answer = await createTeamWith({ name: 'Gannet', 'na/me~': 1 });
    expect(answer.fieldErrors).toEqual(['#/na~1me~0 additionalProperties']);
  });

  it('with a wrong inner value is told where and what', async () => {
    const change = { ...TEAM_CHANGE, houseMeasures: { ...TEAM_CHANGE.houseMeasures, dashMl: 50 } };
    const answer = await manager.put(`/teams/${team.id}`, change, { ifMatch: 1 });
    expect(answer.fieldErrors).toEqual(['#/houseMeasures/dashMl maximum']);
    expect(answer.problem.errors?.[0]?.detail).toContain('one dash [mL]');
    expect(answer.problem.errors?.[0]?.detail).toContain('50');
    expect(answer.problem.errors?.[0]?.detail).toContain('at most 2');
  });

  it('names every wrong field at once', async () => {
    const answer = await manager.put(`/teams/${team.id}`, { name: '', country: 'XX' }, { ifMatch: 1 });
    expect(answer.fieldErrors.sort()).toEqual([
      '#/country enum',
      '#/currency required',
      '#/houseMeasures required',
      '#/name minLength',
    ]);
  });

  it('is not coerced', async () => {
    const change = { ...TEAM_CHANGE, houseMeasures: { ...TEAM_CHANGE.houseMeasures, dashMl: '0.8' } };
    const answer = await manager.put(`/teams/${team.id}`, change, { ifMatch: 1 });
    expect(answer.fieldErrors).toEqual(['#/houseMeasures/dashMl type']);
  });

  it.each([
    ['__proto__', '{"name":"Gannet","__proto__":{"isAdmin":true}}'],
    ['constructor', '{"name":"Gannet","constructor":{"prototype":{"isAdmin":true}}}'],
  ])('with a member %s pollutes nothing and is refused', async (member, text) => {
    const answer = await createTeamWith(text);
    expect(answer.fieldErrors).toEqual([`#/${member} additionalProperties`]);
    expect(({} as { isAdmin?: boolean }).isAdmin).toBeUndefined();
  });

  it.each([
    ['NUL', '{"name":"Gan\\u0000net"}'],
    ['half a character', '{"name":"Gan\\ud800net"}'],
  ])('with %s in a text is refused at the field', async (_title, text) => {
    const answer = await createTeamWith(text);
    expect(answer.fieldErrors).toEqual(['#/name text']);
  });

  it('nested without end is malformed, and quickly so', async () => {
    const started = performance.now();
    const answer = await createTeamWith('['.repeat(100_000) + ']'.repeat(100_000));
    expect(answer.problem.name).toBe('malformed-request');
    expect(performance.now() - started).toBeLessThan(2000);
  });

  it.each([
    ['a hundred thousand entries', `[${'1,'.repeat(100_000)}1]`],
    [
      'twenty thousand unknown members',
      `{${Array.from({ length: 19_990 }, (_, n) => `"m${n}":1`).join(',')}}`,
    ],
  ])('with %s is refused quickly, in a short answer', async (_title, text) => {
    const started = performance.now();
    const answer = await createTeamWith(text);
    expect([400, 422]).toContain(answer.status);
    expect(answer.text.length).toBeLessThan(20_000);
    expect(performance.now() - started).toBeLessThan(2000);
  });
});

describe('If-Match', () => {
  it.each([
    ['missing', undefined],
    ['a star', '*'],
    ['without quotes', '1'],
    ['two revisions', '"1", "2"'],
    ['a word', '"one"'],
    ['negative', '"-1"'],
    ['too long a number', '"12345678901"'],
    ['empty', '""'],
  ])('that is %s does not guard the edit and is asked for', async (_title, value) => {
    const headers: Record<string, string> = value === undefined ? {} : { 'If-Match': value };
    const answer = await manager.put(`/teams/${team.id}`, TEAM_CHANGE, { headers });
    expect(answer.problem).toMatchObject({ name: 'precondition-required', status: 428 });
  });

  it('may be weak, as a proxy that compresses makes it', async () => {
    const { revision } = (await manager.get<Team>(`/teams/${team.id}`)).body;
    const headers = { 'If-Match': `W/"${revision}"` };
    const answer = await manager.put<Team>(
      `/teams/${team.id}`,
      { ...TEAM_CHANGE, name: 'Weak' },
      { headers },
    );
    expect(answer.body.name).toBe('Weak');
  });
});

describe('an address', () => {
  it.each([['/teams/%E0%A4%A'], ['/invitations/%zz'], ['/teams/%00'], ['/teams/..%2f..%2fetc%2fpasswd']])(
    '%s is answered, not crashed on',
    async (path) => {
      const answer = await manager.get(path);
      expect([400, 404]).toContain(answer.status);
    },
  );

  it.each([['/nothing-here'], ['/teams/x/y/z'], ['/'], ['']])(
    '%s unknown to the API is not found',
    async (path) => {
      expect((await manager.get(path)).problem).toMatchObject({ name: 'not-found', status: 404 });
    },
  );

  it('with a query of the wrong kind is told which member', async () => {
    const query = { limit: 'many', from: 'yesterday', colour: 'red' };
    const answer = await manager.get(`/teams/${team.id}/history`, { query });
    expect(answer.fieldErrors.sort()).toEqual([
      '#/colour additionalProperties',
      '#/from format',
      '#/limit type',
    ]);
  });

  it.each([['limit=1&limit=2'], ['limit[$gt]=1'], ['__proto__[x]=1'], ['limit='], ['cursor=%00']])(
    'with the query %s is refused, not obeyed',
    async (query) => {
      expect((await manager.get(`/teams/${team.id}/history?${query}`)).status).toBe(422);
    },
  );

  it.each([['-'.repeat(36)], ['g'.repeat(36)], [`${'0'.repeat(36)},`]])(
    'with %s for an id in the query is told so, before the database is asked',
    async (ids) => {
      const answer = await manager.get(`/teams/${team.id}/versions`, { query: { ids } });
      expect(answer.fieldErrors).toEqual(['#/ids pattern']);
    },
  );

  it('answers HEAD like GET, without a body', async () => {
    const answer = await supertest(app.baseUrl).head('/api/health');
    expect(answer.status).toBe(200);
    expect(answer.text).toBeUndefined();
  });

  it('with a method the route has not is not found', async () => {
    expect((await manager.delete('/auth/me')).status).toBe(404);
  });
});

describe('where a write comes from', () => {
  const write = (headers: Record<string, string>) =>
    supertest(app.baseUrl)
      .post('/api/auth/sign-out')
      .set({ Host: 'bar.example.test:8080', ...headers });

  it.each([
    ['this server', 'http://bar.example.test:8080', 204],
    ['a configured origin', 'https://specs.example.test', 204],
    ['another site', 'https://elsewhere.example.test', 403],
    ['another port', 'http://bar.example.test:9090', 403],
    ['a page without origin', 'null', 403],
    ['no address', 'bar.example.test:8080', 403],
    ['a longer name', 'http://bar.example.test:8080.elsewhere.example.test', 403],
  ])('from %s (%s) it is answered %i', async (_title, origin, status) => {
    expect((await write({ Origin: origin })).status).toBe(status);
  });

  it('without an origin it is refused', async () => {
    const answer = await write({});
    expect(answer.status).toBe(403);
    expect(answer.body).toMatchObject({ name: 'forbidden', type: '/problems/forbidden' });
  });
});

describe('a cookie', () => {
  it.each([
    ['oxymel_session=%E0%A4%A'],
    ['other=%E0%A4%A; oxymel_session=zzz'],
    ['oxymel_session='],
    ['oxymel_session'],
    ['=;;;=;oxymel_session==='],
    [`oxymel_session=${'a'.repeat(4000)}`],
    [`oxymel_session=${'a'.repeat(40)}`],
    ['oxymel_session=\u00e9\u00e9'],
  ])('%s is no session', async (cookie) => {
    const client = app.stranger();
    client.cookie = cookie;
    expect((await client.get('/auth/me')).problem.name).toBe('unauthenticated');
  });

  it('of another application beside ours does no harm', async () => {
    const client = app.stranger();
    client.cookie = `theirs=%E0%A4%A;${manager.cookie}; more=1`;
    expect((await client.get('/auth/me')).status).toBe(200);
  });
});

describe('the headers of an answer', () => {
  it('have a policy that lets nothing inline and nothing from elsewhere in', async () => {
    const { headers } = await manager.get('/health');
    const policy = Object.fromEntries(
      (headers['content-security-policy'] ?? '').split(';').map((directive) => {
        const [name = '', ...values] = directive.trim().split(' ');
        return [name, values];
      }),
    );
    expect(policy).toMatchObject({
      'default-src': ["'self'"],
      'script-src': ["'self'"],
      'style-src': ["'self'"],
      'object-src': ["'none'"],
      'frame-ancestors': ["'none'"],
      'base-uri': ["'none'"],
    });
    expect(JSON.stringify(policy)).not.toMatch(/unsafe|\*|https?:/);
    expect(headers).toMatchObject({
      'x-content-type-options': 'nosniff',
      'referrer-policy': 'same-origin',
      'cache-control': 'no-store',
    });
    expect(headers).not.toHaveProperty('x-powered-by');
    expect(headers).not.toHaveProperty('strict-transport-security');
  });

  it('ask for https only where the cookies do', async () => {
    const secure = await startTestApp({ databaseUrl: app.databaseUrl, config: { secureCookies: true } });
    const { headers } = await secure.stranger().get('/health');
    expect(headers['strict-transport-security']).toMatch(/max-age=\d{7,}/);
    expect(headers['content-security-policy']).toContain('upgrade-insecure-requests');
    await secure.stop();
  });
});
