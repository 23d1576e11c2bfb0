import { randomUUID } from 'node:crypto';

import express, { type Request, type RequestHandler, type Response, Router } from 'express';

import type { Dependencies } from '../dependencies.ts';
import { contextFor } from './access.ts';
import { refuseUnwieldy } from './json-limits.ts';
import { problems } from './problems.ts';
import { limitRate } from './rate-limit.ts';
import type { AnyRoute, RequestContext, RouteResult } from './route.ts';
import { compileBodyCheck, compileTextCheck } from './validation.ts';

const DEFAULT_BODY_LIMIT = '256kb';

/** Gives every request an id that stands in its log lines and in the `instance` of its problems. */
export const assignRequestId: RequestHandler = (_request, response, next) => {
  const id = randomUUID();
  response.locals['requestId'] = id;
  response.setHeader('X-Request-Id', id);
  next();
};

/** Builds the router of /api from the routes. */
export function mountRoutes(routes: readonly AnyRoute[], deps: Dependencies): Router {
  const router = Router();
  for (const definition of routes) {
    router[definition.method](definition.path, ...stepsOf(definition, deps));
  }
  return router;
}

/** What every request goes through, in this order. A stranger's body is not even read where one must be signed in. */
function stepsOf(definition: AnyRoute, deps: Dependencies): RequestHandler[] {
  const limits = definition.limits ?? [];
  const limited = (withBody: boolean) =>
    limits
      .filter(({ also }) => (also !== undefined) === withBody)
      .map((limit) => limitRate(deps.orm, limit, { factor: deps.config.rateLimitFactor }));
  return [
    ...limited(false),
    openContext(definition, deps),
    ...(definition.body ? [requireJson, parseBody(definition)] : []),
    validateInput(definition),
    ...limited(true),
    answer(definition),
  ];
}

/** What the steps of one request hand on. */
interface Call {
  context?: RequestContext;
  input?: unknown;
}

function callOf(response: Response): Call {
  return (response.locals['call'] ??= {}) as Call;
}

function openContext(definition: AnyRoute, deps: Dependencies): RequestHandler {
  return async (request, response, next) => {
    callOf(response).context = await contextFor(definition.access, deps, request, response);
    next();
  };
}

const requireJson: RequestHandler = (request, _response, next) => {
  next(request.is('application/json') ? undefined : problems.unsupportedMediaType());
};

function parseBody({ bodyLimit }: AnyRoute): RequestHandler {
  return express.json({ limit: bodyLimit ?? DEFAULT_BODY_LIMIT, strict: false });
}

function validateInput(definition: AnyRoute): RequestHandler {
  const checkParams = definition.params && compileTextCheck(definition.params);
  const checkQuery = definition.query && compileTextCheck(definition.query);
  const checkBody = definition.body && compileBodyCheck(definition.body);

  return (request, response, next) => {
    const params: unknown = { ...request.params };
    const query: unknown = { ...request.query };
    const body: unknown = request.body;
    refuseBadIds(checkParams, params);
    refuseUnwieldy(query);
    checkQuery?.(query);
    refuseUnwieldy(body);
    checkBody?.(body);
    const ifMatch = definition.ifMatch ? revisionFromIfMatch(request) : 0;
    callOf(response).input = { params, query, body, ifMatch };
    next();
  };
}

/** An id that cannot be one names nothing: it is answered like an id that does not exist. */
function refuseBadIds(check: ((value: unknown) => void) | undefined, params: unknown): void {
  try {
    check?.(params);
  } catch {
    const [name = 'address', value = ''] = Object.entries(params as Record<string, string>).at(-1) ?? [];
    const resource = name.replace(/(Id|Token)$/, '');
    throw problems.notFound(resource, name.endsWith('Id') ? value : 'token');
  }
}

/** `If-Match: "7"` or `W/"7"`; anything else is refused, since it would not guard the edit. */
function revisionFromIfMatch(request: Request): number {
  const header = request.headers['if-match'];
  const digits = header === undefined ? undefined : /^(?:W\/)?"(\d{1,9})"$/.exec(header)?.[1];
  if (digits === undefined) throw problems.preconditionRequired();
  return Number(digits);
}

function answer(definition: AnyRoute): RequestHandler {
  const handle = definition.handler as (context: unknown, input: unknown) => Promise<RouteResult>;
  return async (_request, response) => {
    const { context, input } = callOf(response);
    send(definition, response, await handle(context, input));
  };
}

function send(definition: AnyRoute, response: Response, result: RouteResult): void {
  for (const [name, value] of Object.entries(result.headers ?? {})) response.appendHeader(name, value);
  if (result.revision !== undefined) response.setHeader('ETag', `"${result.revision}"`);
  response.setHeader('Cache-Control', 'no-store');
  response.status(result.status ?? definition.response.status);
  if (definition.response.schema === null) {
    response.end();
  } else if (definition.response.contentType === undefined) {
    response.json(result.body);
  } else {
    response.type(definition.response.contentType).send(result.body);
  }
}
