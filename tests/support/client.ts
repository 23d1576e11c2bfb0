import type { Server } from 'node:http';

import supertest, { type Response } from 'supertest';

import type { Problem } from '#shared/contracts/problem.ts';

import { checkAnswer } from './answer-check.ts';

export type Method = 'get' | 'post' | 'put' | 'delete';

export interface CallOptions {
  query?: Record<string, string | number>;
  /** Sent as JSON; a string is sent as it is. */
  body?: unknown;
  ifMatch?: number;
  headers?: Record<string, string>;
}

/**
 * One browser to the API: it keeps the session cookie, names its origin, and holds every answer to the contract of the
 * route that was called. Paths are those under /api.
 */
export class ApiClient {
  readonly #server: Server;
  /** The Cookie header; empty when signed out. */
  cookie = '';

  constructor(server: Server) {
    this.#server = server;
  }

  get<Body>(path: string, options: CallOptions = {}): Promise<Answer<Body>> {
    return this.call('get', path, options);
  }

  post<Body>(path: string, body?: unknown, options: CallOptions = {}): Promise<Answer<Body>> {
    return this.call('post', path, { body, ...options });
  }

  put<Body>(path: string, body: unknown, options: CallOptions = {}): Promise<Answer<Body>> {
    return this.call('put', path, { body, ...options });
  }

  delete<Body>(path: string, options: CallOptions = {}): Promise<Answer<Body>> {
    return this.call('delete', path, options);
  }

  async call<Body>(method: Method, path: string, options: CallOptions = {}): Promise<Answer<Body>> {
    const { query = {}, body, ifMatch, headers = {} } = options;
    let request = supertest(this.#server)[method](`/api${path}`).query(query).set('Origin', this.#origin());
    if (this.cookie !== '') request = request.set('Cookie', this.cookie);
    if (ifMatch !== undefined) request = request.set('If-Match', `"${ifMatch}"`);
    if (body !== undefined) request = request.set('Content-Type', 'application/json');
    for (const [name, value] of Object.entries(headers)) request = request.set(name, value);
    const response = await request.send(typeof body === 'string' ? body : JSON.stringify(body));
    this.#keepCookie(response);
    checkAnswer({ method, path, response });
    return new Answer<Body>(response);
  }

  /** Supertest calls 127.0.0.1 at the server's own port. */
  #origin(): string {
    const address = this.#server.address();
    return `http://127.0.0.1:${typeof address === 'object' && address !== null ? address.port : 0}`;
  }

  #keepCookie(response: Response): void {
    const set = (response.headers['set-cookie'] ?? []) as unknown as string[];
    const last = set.at(-1)?.split(';')[0];
    if (last !== undefined) this.cookie = last.endsWith('=') ? '' : last;
  }
}

/** An answer. `body` fails the test when the answer is a problem, and `problem` when it is not one. */
export class Answer<Body> {
  readonly status: number;
  readonly headers: Record<string, string>;
  readonly text: string;
  readonly #content: unknown;

  constructor(response: Response) {
    this.status = response.status;
    this.headers = response.headers;
    this.text = response.text;
    this.#content = response.body;
  }

  get isProblem(): boolean {
    return this.status >= 400;
  }

  get body(): Body {
    if (this.isProblem) throw new Error(`unexpected problem: ${this.text}`);
    return this.#content as Body;
  }

  get problem(): Problem {
    if (!this.isProblem) throw new Error(`unexpected success ${this.status}: ${this.text.slice(0, 300)}`);
    return this.#content as Problem;
  }

  /** `#/field code` of each field error. */
  get fieldErrors(): string[] {
    return (this.problem.errors ?? []).map(({ pointer, code }) => `${pointer} ${code}`);
  }
}
