import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import {
  CompareQuerySchema,
  LockRequestSchema,
  UnlockRequestSchema,
  VersionListSchema,
  VersionRetireSchema,
  VersionSchema,
  VersionStateChangeSchema,
} from '#shared/contracts/version.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { changeState, lockVersion, retireVersion, unlockVersion } from './version-state.service.ts';
import { readVersion, readVersions } from './version.service.ts';

const tag = 'Versions';
const teamParams = Type.Object({ teamId: Uuid });
const params = Type.Object({ teamId: Uuid, versionId: Uuid });
const response = { status: 200, schema: VersionSchema };
const change = { method: 'post', tag, params, ifMatch: true, response } as const;

export const versionRoutes: AnyRoute[] = [
  route({
    operationId: 'listVersions',
    method: 'get',
    path: '/teams/:teamId/versions',
    summary: 'One to four versions by id, in the order asked for',
    tag,
    access: inTeam('read'),
    params: teamParams,
    query: CompareQuerySchema,
    response: { status: 200, schema: VersionListSchema },
    handler: async (context, { query }) => ({
      body: { items: await readVersions(context, [...new Set(query.ids.split(','))]) },
    }),
  }),
  route({
    operationId: 'getVersion',
    method: 'get',
    path: '/teams/:teamId/versions/:versionId',
    summary: 'One version',
    tag,
    access: inTeam('read'),
    params,
    response,
    handler: async (context, input) => {
      const version = await readVersion(context, input.params.versionId);
      return { body: version, revision: version.revision };
    },
  }),
  route({
    ...change,
    operationId: 'changeVersionState',
    path: '/teams/:teamId/versions/:versionId/state',
    summary: 'Put a version on trial, or back to draft',
    access: inTeam('edit-specs'),
    body: VersionStateChangeSchema,
    handler: async (context, { params: { versionId }, body, ifMatch }) => {
      const version = await changeState(context, { versionId, ifMatch, change: body });
      return { body: version, revision: version.revision };
    },
  }),
  route({
    ...change,
    operationId: 'retireVersion',
    path: '/teams/:teamId/versions/:versionId/retire',
    summary: 'Take a version out of use, for good',
    access: inTeam('lock'),
    body: VersionRetireSchema,
    handler: async (context, { params: { versionId }, body, ifMatch }) => {
      const version = await retireVersion(context, { versionId, ifMatch, reason: body.reason });
      return { body: version, revision: version.revision };
    },
  }),
  route({
    ...change,
    operationId: 'lockVersion',
    path: '/teams/:teamId/versions/:versionId/lock',
    summary: 'Sign a version as the one to be served',
    access: inTeam('lock'),
    body: LockRequestSchema,
    handler: async (context, { params: { versionId }, ifMatch }) => {
      const version = await lockVersion(context, { versionId, ifMatch });
      return { body: version, revision: version.revision };
    },
  }),
  route({
    ...change,
    operationId: 'unlockVersion',
    path: '/teams/:teamId/versions/:versionId/unlock',
    summary: 'Undo a lock, with a reason',
    access: inTeam('unlock'),
    body: UnlockRequestSchema,
    handler: async (context, { params: { versionId }, body, ifMatch }) => {
      const version = await unlockVersion(context, { versionId, ifMatch, reason: body.reason });
      return { body: version, revision: version.revision };
    },
  }),
];
