import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

import type { Role } from '#shared/contracts/roles.ts';
import type { StandardDrinkPlace } from '#shared/physics/data/standard-drinks.ts';
import type { HouseMeasures } from '#shared/units/house-measures.ts';

import { User } from '../accounts/account.entity.ts';

export const Team = defineEntity({
  name: 'Team',
  tableName: 'team',
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    name: p.string().columnType('text'),
    country: p.string().columnType('text').$type<StandardDrinkPlace>(),
    currency: p.string().columnType('text'),
    houseMeasures: p.json<HouseMeasures>(),
    createdAt: p.datetime().defaultRaw('now()'),
  },
});
export type Team = InferEntity<typeof Team>;

/** A person in a team, with one or more roles. */
export const Membership = defineEntity({
  name: 'Membership',
  tableName: 'membership',
  uniques: [{ properties: ['team', 'user'] }],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    team: () => p.manyToOne(Team).deleteRule('cascade'),
    user: () => p.manyToOne(User).deleteRule('cascade').index(),
    roles: p.array<Role>().columnType('text[]'),
    joinedAt: p.datetime().defaultRaw('now()'),
  },
});
export type Membership = InferEntity<typeof Membership>;

/** A one-time link into a team. Only the SHA-256 of its token is kept. */
export const Invitation = defineEntity({
  name: 'Invitation',
  tableName: 'invitation',
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    team: () => p.manyToOne(Team).deleteRule('cascade').index(),
    label: p.string().columnType('text'),
    roles: p.array<Role>().columnType('text[]'),
    tokenHash: p.string().columnType('text').unique(),
    createdBy: () => p.manyToOne(User).deleteRule('set null').nullable(),
    createdAt: p.datetime().defaultRaw('now()'),
    expiresAt: p.datetime(),
    usedAt: p.datetime().nullable(),
  },
});
export type Invitation = InferEntity<typeof Invitation>;

/** What somebody did. A trigger refuses every update and delete: the history is append-only. */
export const AuditEvent = defineEntity({
  name: 'AuditEvent',
  tableName: 'audit_event',
  indexes: [{ properties: ['team', 'at', 'id'] }, { properties: ['team', 'subjectId', 'at', 'id'] }],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    team: () => p.manyToOne(Team).deleteRule('no action'),
    at: p.datetime().defaultRaw('now()'),
    actorId: p.uuid().nullable(),
    actorName: p.string().columnType('text').nullable(),
    action: p.string().columnType('text'),
    subjectType: p.string().columnType('text'),
    subjectId: p.uuid().nullable(),
    summary: p.string().columnType('text'),
  },
});
export type AuditEvent = InferEntity<typeof AuditEvent>;
