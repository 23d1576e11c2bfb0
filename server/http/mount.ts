import { randomUUID } from 'node:crypto';

import express, { type Request, type RequestHandler, type Response, Router } from 'express';

import { hasPermission } from '#shared/contracts/roles.ts';

import type { Dependencies } from '../dependencies.ts';
import { findMembership } from '../modules/teams/index.ts';
import { problems } from './problems.ts';
import type { AnyRoute, RequestContext, RouteResult, SignedInContext, TeamContext } from './route.ts';
import { compileBodyCheck, compileTextCheck } from './validation.ts';

const DEFAULT_BODY_LIMIT = '256kb';

/** Gives every request an id that stands in its log lines and in the `instance` of its problems. */
export const assignRequestId: RequestHandler = (_request, response, next) => {
  const id = randomUUID();
  response.locals['requestId'] = id;
  response.setHeader('X-Request-Id', id);
  next();
};

/** Builds the router of /api from the routes: body, access, validation, handler, answer, in this order. */
export function mountRoutes(routes: readonly AnyRoute[], deps: Dependencies): Router {
  const router = Router();
  for (const definition of routes) {
    const parseBody = express.json({ limit: definition.bodyLimit ?? DEFAULT_BODY_LIMIT, strict: false });
    const steps: RequestHandler[] = definition.body ? [requireJson, parseBody] : [];
    router[definition.method](definition.path, ...steps, handlerOf(definition, deps));
  }
  return router;
}

const requireJson: RequestHandler = (request, _response, next) => {
  next(request.is('application/json') ? undefined : problems.unsupportedMediaType());
};

function handlerOf(definition: AnyRoute, deps: Dependencies): RequestHandler {
  const checkParams = definition.params && compileTextCheck(definition.params);
  const checkQuery = definition.query && compileTextCheck(definition.query);
  const checkBody = definition.body && compileBodyCheck(definition.body);
  const handle = definition.handler as (context: RequestContext, input: unknown) => Promise<RouteResult>;

  return async (request, response) => {
    const context = await contextFor(definition, deps, request, response);
    const params: unknown = { ...request.params };
    const query: unknown = { ...request.query };
    const body: unknown = request.body;
    refuseBadIds(definition, checkParams, params);
    checkQuery?.(query);
    checkBody?.(body);
    const ifMatch = definition.ifMatch ? revisionFromIfMatch(request) : 0;
    send(definition, response, await handle(context, { params, query, body, ifMatch }));
  };
}

/** An id that is no UUID names nothing: it is answered like an id that does not exist. */
function refuseBadIds(
  definition: AnyRoute,
  check: ((value: unknown) => void) | undefined,
  params: unknown,
): void {
  try {
    check?.(params);
  } catch {
    throw problems.notFound(definition.tag.toLowerCase(), 'in the address');
  }
}

async function contextFor(
  definition: AnyRoute,
  deps: Dependencies,
  request: Request,
  response: Response,
): Promise<RequestContext | SignedInContext | TeamContext> {
  const sessionId = deps.sessions.readSessionCookie(request.headers.cookie ?? '');
  const base: RequestContext = {
    ...deps,
    em: deps.orm.em.fork(),
    requestId: String(response.locals['requestId']),
    ip: request.ip ?? 'unknown',
    sessionId,
  };
  if (definition.access.kind === 'public') return base;

  const signedIn = { ...base, person: await personOf(deps, sessionId, response) };
  if (definition.access.kind === 'signed in') return signedIn;

  const teamId = String(request.params['teamId']);
  const membership = await findMembership(base.em, { teamId, userId: signedIn.person.id });
  if (membership === null) throw problems.notFound('team', teamId);
  if (!hasPermission(membership.roles, definition.access.permission)) {
    throw problems.forbidden(
      `Your roles (${membership.roles.join(', ')}) do not include “${definition.access.permission}”.`,
    );
  }
  return { ...signedIn, teamId, roles: membership.roles };
}

async function personOf(deps: Dependencies, sessionId: string | null, response: Response) {
  if (sessionId === null) throw problems.unauthenticated();
  const { session, user } = await deps.sessions.validateSession(sessionId);
  if (session === null) {
    response.appendHeader('Set-Cookie', deps.sessions.createBlankSessionCookie().serialize());
    throw problems.unauthenticated();
  }
  if (session.fresh) {
    response.appendHeader('Set-Cookie', deps.sessions.createSessionCookie(session.id).serialize());
  }
  return { id: user.id, email: user.email, name: user.name };
}

/** `If-Match: "7"` or `W/"7"`; anything else is refused, since it would not guard the edit. */
function revisionFromIfMatch(request: Request): number {
  const header = request.headers['if-match'];
  const digits = header === undefined ? undefined : /^(?:W\/)?"(\d{1,9})"$/.exec(header)?.[1];
  if (digits === undefined) throw problems.preconditionRequired();
  return Number(digits);
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
