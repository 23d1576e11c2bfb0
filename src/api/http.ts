import type { Problem, ProblemName } from '#shared/contracts/problem.ts';

/** The server answered that it will not do it; `problem` says why. */
export class ApiProblem extends Error {
  readonly problem: Problem;

  constructor(problem: Problem) {
    super(problem.detail);
    this.name = 'ApiProblem';
    this.problem = problem;
  }

  is(name: ProblemName): boolean {
    return this.problem.name === name;
  }
}

/** No answer came: no network, or the server is down. Nothing is known about whether a write arrived. */
export class NoAnswerError extends Error {
  constructor(cause: unknown) {
    super('The server could not be reached.', { cause });
    this.name = 'NoAnswerError';
  }
}

export interface ApiRequest {
  method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Under /api, beginning with a slash. */
  path: string;
  query?: Readonly<Record<string, string | number | undefined>> | undefined;
  body?: unknown;
  /** Revision this edit is based on; a stale one is refused with `stale-version`. */
  ifMatch?: number | undefined;
  signal?: AbortSignal | undefined;
  /** Do not take the person to the sign-in page when nobody is signed in. */
  maySignedOut?: boolean | undefined;
}

type SignedOutListener = () => void;
let tellSignedOut: SignedOutListener = () => undefined;

/** The one place that hears that the session has ended, whichever request found out. */
export function onSignedOut(listener: SignedOutListener): void {
  tellSignedOut = listener;
}

/**
 * One request to the server. The caller's return type names the resource, which API tests hold to its schema.
 * Throws `ApiProblem` for a refusal, `NoAnswerError` without an answer; an abort is passed on as it is.
 */
export async function request<Answer>(input: ApiRequest): Promise<Answer> {
  const response = await send(input);
  if (response.ok) return (response.status === 204 ? undefined : await readJson(response)) as Answer;
  const problem = await readProblem(response);
  if (problem.name === 'unauthenticated' && input.maySignedOut !== true) tellSignedOut();
  throw new ApiProblem(problem);
}

async function send(input: ApiRequest): Promise<Response> {
  try {
    return await fetch(urlOf(input), {
      method: input.method,
      headers: headersOf(input),
      credentials: 'same-origin',
      ...(input.body !== undefined && { body: JSON.stringify(input.body) }),
      ...(input.signal !== undefined && { signal: input.signal }),
    });
  } catch (error) {
    if (input.signal?.aborted === true) throw error;
    throw new NoAnswerError(error);
  }
}

function urlOf({ path, query = {} }: ApiRequest): string {
  const pairs = Object.entries(query).flatMap(([key, value]): [string, string][] =>
    value === undefined ? [] : [[key, String(value)]],
  );
  return pairs.length === 0 ? `/api${path}` : `/api${path}?${new URLSearchParams(pairs).toString()}`;
}

function headersOf({ body, ifMatch }: ApiRequest): Record<string, string> {
  return {
    accept: 'application/json, application/problem+json',
    ...(body !== undefined && { 'content-type': 'application/json' }),
    ...(ifMatch !== undefined && { 'if-match': `"${ifMatch}"` }),
  };
}

/** A body that breaks off or is no JSON is as good as no answer. */
async function readJson(response: Response): Promise<unknown> {
  try {
    return await response.json();
  } catch (error) {
    throw new NoAnswerError(error);
  }
}

/** A refusal without a problem body comes from something between us and the server, such as a proxy. */
async function readProblem(response: Response): Promise<Problem> {
  const isProblem = response.headers.get('content-type')?.startsWith('application/problem+json') === true;
  if (isProblem) return (await readJson(response)) as Problem;
  throw new NoAnswerError(new Error(`status ${response.status} without a problem body`));
}
