import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import {
  BranchSchema,
  DraftBodySchema,
  DraftFromVersionSchema,
  SpecCreateSchema,
  SpecListQuerySchema,
  SpecPageSchema,
  SpecSchema,
  SpecUpdateSchema,
} from '#shared/contracts/spec.ts';
import { VersionCreateSchema, VersionListSchema, VersionSchema } from '#shared/contracts/version.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { summaryOfRow } from './spec.mapper.ts';
import { listSpecs, loadSpec } from './spec.queries.ts';
import {
  branchSpec,
  createSpec,
  putDraft,
  readSpec,
  renameSpec,
  setSpecRetired,
  startDraftFromVersion,
} from './spec.service.ts';
import { readVersionsOfSpec, saveVersion } from './version.service.ts';

const tag = 'Specs';
const teamParams = Type.Object({ teamId: Uuid });
const specParams = Type.Object({ teamId: Uuid, specId: Uuid });

export const specOnlyRoutes: AnyRoute[] = [
  route({
    operationId: 'listSpecs',
    method: 'get',
    path: '/teams/:teamId/specs',
    summary: 'A page of the specs, with the headline figures of their newest versions',
    tag,
    access: inTeam('read'),
    params: teamParams,
    query: SpecListQuerySchema,
    response: { status: 200, schema: SpecPageSchema },
    handler: async ({ em, teamId }, { query }) => {
      const { items, nextCursor } = await listSpecs(em, { teamId, query });
      return { body: { items: items.map(summaryOfRow), nextCursor } };
    },
  }),
  route({
    operationId: 'createSpec',
    method: 'post',
    path: '/teams/:teamId/specs',
    summary: 'Start a spec with an empty draft',
    tag,
    access: inTeam('edit-specs'),
    params: teamParams,
    body: SpecCreateSchema,
    response: { status: 201, schema: SpecSchema },
    handler: async (context, { body }) => {
      const spec = await createSpec(context, body);
      return { body: spec, revision: spec.revision };
    },
  }),
  route({
    operationId: 'getSpec',
    method: 'get',
    path: '/teams/:teamId/specs/:specId',
    summary: 'A spec with its working draft',
    tag,
    access: inTeam('read'),
    params: specParams,
    response: { status: 200, schema: SpecSchema },
    handler: async (context, { params }) => {
      const spec = await readSpec(context, params.specId);
      return { body: spec, revision: spec.revision };
    },
  }),
  route({
    operationId: 'updateSpec',
    method: 'put',
    path: '/teams/:teamId/specs/:specId',
    summary: 'Change the name, the variant’s name and what the drink is for',
    tag,
    access: inTeam('edit-specs'),
    params: specParams,
    body: SpecUpdateSchema,
    ifMatch: true,
    response: { status: 200, schema: SpecSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const spec = await renameSpec(context, { specId: params.specId, update: body, ifMatch });
      return { body: spec, revision: spec.revision };
    },
  }),
  ...(['retire', 'restore'] as const).map((action) =>
    route({
      operationId: `${action}Spec`,
      method: 'post',
      path: `/teams/:teamId/specs/:specId/${action}`,
      summary: action === 'retire' ? 'Take a spec out of use' : 'Bring a retired spec back',
      tag,
      access: inTeam('lock'),
      params: specParams,
      ifMatch: true,
      response: { status: 200, schema: SpecSchema },
      handler: async (context, { params, ifMatch }) => {
        const { specId } = params;
        const spec = await setSpecRetired(context, { specId, retired: action === 'retire', ifMatch });
        return { body: spec, revision: spec.revision };
      },
    }),
  ),
  route({
    operationId: 'branchSpec',
    method: 'post',
    path: '/teams/:teamId/specs/:specId/branch',
    summary: 'A new variant whose draft is a version of this spec',
    tag,
    access: inTeam('edit-specs'),
    params: specParams,
    body: BranchSchema,
    response: { status: 201, schema: SpecSchema },
    handler: async (context, { params, body }) => {
      const spec = await branchSpec(context, { specId: params.specId, branch: body });
      return { body: spec, revision: spec.revision };
    },
  }),
];

/** The working draft: its If-Match is the draft's own revision, `draftRevision` of the spec. */
export const draftRoutes: AnyRoute[] = [
  route({
    operationId: 'putDraft',
    method: 'put',
    path: '/teams/:teamId/specs/:specId/draft',
    summary: 'Replace the working draft; If-Match is its draftRevision',
    tag,
    access: inTeam('edit-specs'),
    params: specParams,
    body: DraftBodySchema,
    ifMatch: true,
    response: { status: 200, schema: SpecSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const spec = await putDraft(context, { specId: params.specId, draft: body, ifMatch });
      return { body: spec, revision: spec.revision };
    },
  }),
  route({
    operationId: 'startDraftFromVersion',
    method: 'post',
    path: '/teams/:teamId/specs/:specId/draft/from-version',
    summary: 'Make a version the base of the draft; If-Match is the draftRevision',
    tag,
    access: inTeam('edit-specs'),
    params: specParams,
    body: DraftFromVersionSchema,
    ifMatch: true,
    response: { status: 200, schema: SpecSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const { specId } = params;
      const spec = await startDraftFromVersion(context, { specId, versionId: body.versionId, ifMatch });
      return { body: spec, revision: spec.revision };
    },
  }),
  route({
    operationId: 'saveVersion',
    method: 'post',
    path: '/teams/:teamId/specs/:specId/versions',
    summary: 'Save the working draft as the next version; If-Match is the draftRevision',
    tag,
    access: inTeam('edit-specs'),
    params: specParams,
    body: VersionCreateSchema,
    ifMatch: true,
    response: { status: 201, schema: VersionSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const version = await saveVersion(context, { specId: params.specId, why: body.why, ifMatch });
      return { body: version, revision: version.revision };
    },
  }),
  route({
    operationId: 'listVersionsOfSpec',
    method: 'get',
    path: '/teams/:teamId/specs/:specId/versions',
    summary: 'Every version of a spec, the newest first',
    tag,
    access: inTeam('read'),
    params: specParams,
    response: { status: 200, schema: VersionListSchema },
    handler: async (context, { params }) => {
      await loadSpec(context.em, { teamId: context.teamId, specId: params.specId });
      return { body: { items: await readVersionsOfSpec(context, params.specId) } };
    },
  }),
];
