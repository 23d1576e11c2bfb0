import { vi } from 'vitest';

import { PROBLEM_NAMES, type Problem, type ProblemName } from '#shared/contracts/problem.ts';

export interface SentRequest {
  method: string;
  /** Path and query under /api. */
  path: string;
  body: unknown;
  headers: Headers;
}

export type FakeAnswer = { status: number; body?: unknown } | 'no network' | 'never';

/**
 * Puts a server made of a function in place of `fetch`, at the network's edge: everything of the client's own is real.
 * Returns what was sent, in order.
 */
export function fakeApi(answer: (sent: SentRequest) => FakeAnswer): SentRequest[] {
  const requests: SentRequest[] = [];
  vi.stubGlobal('fetch', (url: string, init: RequestInit) => {
    const sent: SentRequest = {
      method: init.method ?? 'GET',
      path: url.replace(/^\/api/, ''),
      body: typeof init.body === 'string' ? (JSON.parse(init.body) as unknown) : undefined,
      headers: new Headers(init.headers),
    };
    requests.push(sent);
    return responseOf(answer(sent), init.signal ?? null);
  });
  return requests;
}

function responseOf(answer: FakeAnswer, signal: AbortSignal | null): Promise<Response> {
  if (answer === 'no network') return Promise.reject(new TypeError('Failed to fetch'));
  if (answer === 'never') {
    return new Promise((_resolve, reject) => {
      signal?.addEventListener('abort', () => reject(new DOMException('aborted', 'AbortError')));
    });
  }
  const type = answer.status >= 400 ? 'application/problem+json' : 'application/json';
  const body = answer.body === undefined ? null : JSON.stringify(answer.body);
  return Promise.resolve(new Response(body, { status: answer.status, headers: { 'content-type': type } }));
}

/** A problem as the server sends it. */
export function aProblem(name: ProblemName, status: number, over: Partial<Problem> = {}): FakeAnswer {
  if (!PROBLEM_NAMES.includes(name)) throw new Error(`no problem is named ${name}`);
  const problem: Problem = {
    type: `/problems/${name}`,
    title: `title of ${name}`,
    status,
    detail: `detail of ${name}`,
    instance: 'request-1',
    name,
    ...over,
  };
  return { status, body: problem };
}
