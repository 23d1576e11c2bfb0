import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

import { Team } from '../teams/team.entity.ts';

export const Glass = defineEntity({
  name: 'Glass',
  tableName: 'glass',
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    team: () => p.manyToOne(Team).deleteRule('cascade').index(),
    name: p.string().columnType('text'),
    profile: p.json<{ heightMm: number; radiusMm: number }[]>(),
    stemMm: p.double().$type<number>(),
    brimMl: p.double().$type<number>(),
    retiredAt: p.datetime().nullable(),
    createdAt: p.datetime().defaultRaw('now()'),
  },
});
export type Glass = InferEntity<typeof Glass>;
