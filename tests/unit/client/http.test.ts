import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

import { ApiProblem, NoAnswerError, onSignedOut, request } from '#src/api/http.ts';
import { aProblem, fakeApi } from '#tests/support/fake-api.ts';

const signedOut = vi.fn();

beforeEach(() => {
  signedOut.mockReset();
  onSignedOut(signedOut);
});
afterEach(() => vi.unstubAllGlobals());

async function failureOf(promise: Promise<unknown>): Promise<unknown> {
  return await promise.then(
    () => {
      throw new Error('this request was to fail');
    },
    (error: unknown) => error,
  );
}

describe('a request', () => {
  it('goes under /api as JSON, names the revision it is based on, and leaves out what is not asked for', async () => {
    const sent = fakeApi(() => ({ status: 200, body: { id: 'x' } }));
    const answer = await request({
      method: 'PUT',
      path: '/teams/1',
      query: { search: 'sour & sweet', state: undefined, limit: 20 },
      body: { name: 'Harbour' },
      ifMatch: 7,
    });
    expect(answer).toEqual({ id: 'x' });
    expect(sent).toHaveLength(1);
    expect(sent[0]).toMatchObject({
      method: 'PUT',
      path: '/teams/1?search=sour+%26+sweet&limit=20',
      body: { name: 'Harbour' },
    });
    expect(sent[0]?.headers.get('if-match')).toBe('"7"');
    expect(sent[0]?.headers.get('content-type')).toBe('application/json');
  });

  it('sends neither a body nor If-Match when there is none', async () => {
    const sent = fakeApi(() => ({ status: 200, body: {} }));
    await request({ method: 'GET', path: '/teams/1' });
    expect(sent[0]?.body).toBeUndefined();
    expect(sent[0]?.headers.has('if-match')).toBe(false);
    expect(sent[0]?.headers.has('content-type')).toBe(false);
  });

  it('answers nothing for a 204', async () => {
    fakeApi(() => ({ status: 204 }));
    expect(await request({ method: 'DELETE', path: '/x' })).toBeUndefined();
  });
});

describe('a refusal', () => {
  it('hands on a stale save with the state as it stands now', async () => {
    fakeApi(() => aProblem('stale-version', 412, { currentRevision: 8, current: { name: 'Theirs' } }));
    const failure = await failureOf(request({ method: 'PUT', path: '/teams/1', body: {}, ifMatch: 7 }));
    expect(failure).toBeInstanceOf(ApiProblem);
    const { problem } = failure as ApiProblem;
    expect(problem).toMatchObject({ name: 'stale-version', currentRevision: 8, current: { name: 'Theirs' } });
  });

  it('hands on what is wrong with each field', async () => {
    const errors = [{ pointer: '#/name', code: 'minLength', detail: 'The name is empty.' }];
    fakeApi(() => aProblem('invalid-fields', 422, { errors }));
    const failure = await failureOf(request({ method: 'POST', path: '/teams', body: {} }));
    expect((failure as ApiProblem).problem.errors).toEqual(errors);
  });

  it('tells the one listener when nobody is signed in any more', async () => {
    fakeApi(() => aProblem('unauthenticated', 401));
    await failureOf(request({ method: 'GET', path: '/teams/1' }));
    expect(signedOut).toHaveBeenCalledTimes(1);
  });

  it('does not for a wrong password, nor where being signed out is an answer', async () => {
    fakeApi(({ path }) =>
      path === '/auth/sign-in' ? aProblem('wrong-credentials', 401) : aProblem('unauthenticated', 401),
    );
    await failureOf(request({ method: 'POST', path: '/auth/sign-in', body: {} }));
    await failureOf(request({ method: 'GET', path: '/auth/me', maySignedOut: true }));
    expect(signedOut).not.toHaveBeenCalled();
  });
});

describe('no answer', () => {
  it('is its own kind of failure when the network is down', async () => {
    fakeApi(() => 'no network');
    expect(await failureOf(request({ method: 'GET', path: '/x' }))).toBeInstanceOf(NoAnswerError);
  });

  it('is what a page of a proxy or a broken body amounts to', async () => {
    vi.stubGlobal('fetch', () =>
      Promise.resolve(
        new Response('<h1>Bad gateway</h1>', { status: 502, headers: { 'content-type': 'text/html' } }),
      ),
    );
    expect(await failureOf(request({ method: 'GET', path: '/x' }))).toBeInstanceOf(NoAnswerError);
    vi.stubGlobal('fetch', () =>
      Promise.resolve(
        new Response('{"message":"no"}', { status: 503, headers: { 'content-type': 'application/json' } }),
      ),
    );
    expect(await failureOf(request({ method: 'GET', path: '/x' }))).toBeInstanceOf(NoAnswerError);
    vi.stubGlobal('fetch', () => Promise.resolve(new Response('{"id":', { status: 200 })));
    expect(await failureOf(request({ method: 'GET', path: '/x' }))).toBeInstanceOf(NoAnswerError);
  });

  it('is not confused with a request that was called off', async () => {
    fakeApi(() => 'never');
    const controller = new AbortController();
    const failure = failureOf(request({ method: 'GET', path: '/x', signal: controller.signal }));
    controller.abort();
    expect(await failure).not.toBeInstanceOf(NoAnswerError);
    expect(await failure).toMatchObject({ name: 'AbortError' });
  });
});
