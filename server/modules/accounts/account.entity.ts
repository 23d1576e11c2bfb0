import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

/** A person who can sign in. The only entity that belongs to no team. */
export const User = defineEntity({
  name: 'User',
  tableName: 'app_user',
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    email: p.string().columnType('text').unique(),
    name: p.string().columnType('text'),
    passwordHash: p.string().columnType('text').hidden(),
    createdAt: p.datetime().defaultRaw('now()'),
  },
});
export type User = InferEntity<typeof User>;

/** A signed-in browser. The id is the SHA-256 of the cookie's value, so that a read of the table opens no session. */
export const Session = defineEntity({
  name: 'Session',
  tableName: 'session',
  properties: {
    id: p.string().columnType('text').primary(),
    user: () => p.manyToOne(User).deleteRule('cascade').index(),
    expiresAt: p.datetime(),
  },
});
export type Session = InferEntity<typeof Session>;
