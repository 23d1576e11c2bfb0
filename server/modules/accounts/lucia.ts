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

/** Sessions last this long after their last use; the cookie is renewed halfway. */
const SESSION_DAYS = 30;

/** Sessions in PostgreSQL. `secureCookies` goes with https. */
export function createSessionManager(orm: MikroORM, options: { secureCookies: boolean }): SessionManager {
  return new Lucia(sessionAdapter(orm), {
    sessionExpiresIn: new TimeSpan(SESSION_DAYS, 'd'),
    sessionCookie: {
      name: 'oxymel_session',
      attributes: { sameSite: 'lax', secure: options.secureCookies, path: '/' },
    },
    getUserAttributes: (user) => ({ email: user.email, name: user.name }),
  });
}

/** What is stored is the hash of the cookie's value. */
function hashOf(sessionId: string): string {
  return createHash('sha256').update(sessionId).digest('hex');
}

function sessionAdapter(orm: MikroORM): Adapter {
  const fork = () => orm.em.fork();
  return {
    async getSessionAndUser(sessionId): Promise<[DatabaseSession | null, DatabaseUser | null]> {
      const row = await fork().findOne(Session, { id: hashOf(sessionId) }, { populate: ['user'] });
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
      await fork().insert(Session, { id: hashOf(id), user: userId, expiresAt });
    },
    async updateSessionExpiration(sessionId, expiresAt) {
      await fork().nativeUpdate(Session, { id: hashOf(sessionId) }, { expiresAt });
    },
    async deleteSession(sessionId) {
      await fork().nativeDelete(Session, { id: hashOf(sessionId) });
    },
    async deleteUserSessions(userId) {
      await fork().nativeDelete(Session, { user: userId });
    },
    async deleteExpiredSessions() {
      await fork().nativeDelete(Session, { expiresAt: { $lt: new Date() } });
    },
  };
}
