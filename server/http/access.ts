import type { Request, Response } from 'express';

import { hasPermission } from '#shared/contracts/roles.ts';

import type { Dependencies } from '../dependencies.ts';
import { sessionIdFromCookies } from '../modules/accounts/lucia.ts';
import { findMembership } from '../modules/teams/index.ts';
import { problems } from './problems.ts';
import type { Access, RequestContext, SignedInContext, SignedInPerson, TeamContext } from './route.ts';

/**
 * What the handler may know and do, or the refusal: 401 without a session, 404 in a team the person is not in, 403
 * without the permission.
 */
export async function contextFor(
  access: Access,
  deps: Dependencies,
  request: Request,
  response: Response,
): Promise<RequestContext | SignedInContext | TeamContext> {
  const sessionId = sessionIdFromCookies(request.headers.cookie);
  const base: RequestContext = {
    ...deps,
    em: deps.orm.em.fork(),
    requestId: String(response.locals['requestId']),
    ip: request.ip ?? 'unknown',
    sessionId,
  };
  if (access.kind === 'public') return base;

  const signedIn = { ...base, person: await personOf(deps, sessionId, response) };
  if (access.kind === 'signed in') return signedIn;

  const teamId = String(request.params['teamId']);
  const membership = await findMembership(base.em, { teamId, userId: signedIn.person.id });
  if (membership === null) throw problems.notFound('team', teamId);
  if (!hasPermission(membership.roles, access.permission)) {
    throw problems.forbidden(
      `Your roles (${membership.roles.join(', ')}) do not include “${access.permission}”.`,
    );
  }
  return { ...signedIn, teamId: membership.team.id, roles: membership.roles };
}

async function personOf(
  deps: Dependencies,
  sessionId: string | null,
  response: Response,
): Promise<SignedInPerson> {
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
