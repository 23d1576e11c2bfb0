import { deletePassedWindows } from '../../http/rate-limit.ts';
import type { RequestContext } from '../../http/route.ts';

/** Starts a new session and ends the one that the browser came with. Returns the cookie to set. */
export async function startSession(
  { sessions, sessionId, orm }: RequestContext,
  userId: string,
): Promise<string> {
  if (sessionId !== null) await sessions.invalidateSession(sessionId);
  // Housekeeping rides along here, so that no server needs a clock of its own for it.
  await sessions.deleteExpiredSessions();
  await deletePassedWindows(orm);
  const session = await sessions.createSession(userId, {});
  return sessions.createSessionCookie(session.id).serialize();
}

/** Ends the session, if there is one. Returns the cookie that clears the browser's. */
export async function endSession({ sessions, sessionId }: RequestContext): Promise<string> {
  if (sessionId !== null) await sessions.invalidateSession(sessionId);
  return sessions.createBlankSessionCookie().serialize();
}
