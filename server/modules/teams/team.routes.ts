import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import {
  HistoryPageSchema,
  HistoryQuerySchema,
  TeamCreateSchema,
  TeamSchema,
  TeamUpdateSchema,
} from '#shared/contracts/team.ts';

import { type AnyRoute, SIGNED_IN, inTeam, route } from '../../http/route.ts';
import { findHistory } from './history.queries.ts';
import { TEAM_CREATION_LIMITS } from './team.limits.ts';
import { toHistoryEvent, toTeam } from './team.mapper.ts';
import { loadTeam } from './team.queries.ts';
import { changeTeam, createTeam } from './team.service.ts';

const tag = 'Teams';
const params = Type.Object({ teamId: Uuid });

export const teamOnlyRoutes: AnyRoute[] = [
  route({
    operationId: 'createTeam',
    method: 'post',
    path: '/teams',
    summary: 'Make a team, with oneself as its manager',
    tag,
    access: SIGNED_IN,
    limits: TEAM_CREATION_LIMITS,
    body: TeamCreateSchema,
    response: { status: 201, schema: TeamSchema },
    handler: async ({ em, person }, { body }) => {
      const team = createTeam(em, { name: body.name, creator: person });
      await em.flush();
      return { body: toTeam(team), revision: team.revision };
    },
  }),
  route({
    operationId: 'getTeam',
    method: 'get',
    path: '/teams/:teamId',
    summary: 'The team and its settings',
    tag,
    access: inTeam('read'),
    params,
    response: { status: 200, schema: TeamSchema },
    handler: async ({ em, teamId }) => {
      const team = await loadTeam(em, teamId);
      return { body: toTeam(team), revision: team.revision };
    },
  }),
  route({
    operationId: 'updateTeam',
    method: 'put',
    path: '/teams/:teamId',
    summary: 'Change the name, country, currency and house measures',
    tag,
    access: inTeam('manage-team'),
    params,
    body: TeamUpdateSchema,
    ifMatch: true,
    response: { status: 200, schema: TeamSchema },
    handler: async (context, { body, ifMatch }) => {
      const team = await changeTeam(context, { change: body, ifMatch });
      return { body: team, revision: team.revision };
    },
  }),
  route({
    operationId: 'listHistory',
    method: 'get',
    path: '/teams/:teamId/history',
    summary: 'Who did what, the newest first; days are those of UTC',
    tag,
    access: inTeam('read-history'),
    params,
    query: HistoryQuerySchema,
    response: { status: 200, schema: HistoryPageSchema },
    handler: async ({ em, teamId }, { query }) => {
      const { items, nextCursor } = await findHistory(em, { teamId, query });
      return { body: { items: items.map(toHistoryEvent), nextCursor } };
    },
  }),
];
