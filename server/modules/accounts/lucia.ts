import { createHash } from 'node:crypto';

import type { MikroORM } from '@mikro-orm/postgresql';
import { type Adapter, type DatabaseSession, type DatabaseUser, Lucia, TimeSpan } from 'lucia';

import { Session } from './account.entity.ts';

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<Record<never, never>, { email: string; name: string }>;
    UserId: string;
    DatabaseUserAttributes: { email: string; name: string };
  }
}

export type SessionManager = Lucia<Record<never, never>, { email: string; name: string }>;

const SESSION_COOKIE = 'oxymel_session';

/** Sessions last this long after their last use; the cookie is renewed halfway. */
const SESSION_DAYS = 30;

/** Sessions in PostgreSQL. `secureCookies` goes with https. */
export function createSessionManager(orm: MikroORM, options: { secureCookies: boolean }): SessionManager {
  return new Lucia(sessionAdapter(orm), {
    sessionExpiresIn: new TimeSpan(SESSION_DAYS, 'd'),
    sessionCookie: {
      name: SESSION_COOKIE,
      attributes: { sameSite: 'lax', secure: options.secureCookies, path: '/' },
    },
    getUserAttributes: (user) => ({ email: user.email, name: user.name }),
  });
}

/**
 * The session's id in a Cookie header, or null. Other applications on the host may have set any cookie: only ours is
 * looked at, and whatever is not an id is as good as none.
 */
export function sessionIdFromCookies(header: string | undefined): string | null {
  for (const pair of (header ?? '').split(';')) {
    const [name, value] = pair.split('=', 2);
    if (name?.trim() === SESSION_COOKIE && /^[a-z0-9]{20,100}$/.test(value ?? '')) return value ?? null;
  }
  return null;
}

/** What is stored of a session's id, which is the cookie's value: its hash. */
export function storedSessionId(sessionId: string): string {
  return createHash('sha256').update(sessionId).digest('hex');
}

function sessionAdapter(orm: MikroORM): Adapter {
  const fork = () => orm.em.fork();
  return {
    async getSessionAndUser(sessionId): Promise<[DatabaseSession | null, DatabaseUser | null]> {
      const row = await fork().findOne(Session, { id: storedSessionId(sessionId) }, { populate: ['user'] });
      if (row === null) return [null, null];
      const { id, email, name } = row.user;
      const session = { id: sessionId, userId: id, expiresAt: row.expiresAt, attributes: {} };
      return [session, { id, attributes: { email, name } }];
    },
    async getUserSessions(userId) {
      const rows = await fork().find(Session, { user: userId }, { limit: 200 });
      return rows.map((row) => ({ id: row.id, userId, expiresAt: row.expiresAt, attributes: {} }));
    },
    async setSession({ id, userId, expiresAt }) {
      await fork().insert(Session, { id: storedSessionId(id), user: userId, expiresAt });
    },
    async updateSessionExpiration(sessionId, expiresAt) {
      await fork().nativeUpdate(Session, { id: storedSessionId(sessionId) }, { expiresAt });
    },
    async deleteSession(sessionId) {
      await fork().nativeDelete(Session, { id: storedSessionId(sessionId) });
    },
    async deleteUserSessions(userId) {
      await fork().nativeDelete(Session, { user: userId });
    },
    async deleteExpiredSessions() {
      await fork().nativeDelete(Session, { expiresAt: { $lt: new Date() } });
    },
  };
}
