import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import { GlassListSchema, GlassSchema, GlassWriteSchema } from '#shared/contracts/glass.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { toGlass } from './glass.mapper.ts';
import { findGlasses } from './glass.queries.ts';
import { addGlass, changeGlass, setGlassRetired } from './glass.service.ts';

const tag = 'Glasses';
const teamParams = Type.Object({ teamId: Uuid });
const glassParams = Type.Object({ teamId: Uuid, glassId: Uuid });

export const glassRoutes: AnyRoute[] = [
  route({
    operationId: 'listGlasses',
    method: 'get',
    path: '/teams/:teamId/glasses',
    summary: 'Every glass of the team, retired ones too',
    tag,
    access: inTeam('read'),
    params: teamParams,
    response: { status: 200, schema: GlassListSchema },
    handler: async ({ em, teamId }) => ({ body: { items: (await findGlasses(em, teamId)).map(toGlass) } }),
  }),
  route({
    operationId: 'createGlass',
    method: 'post',
    path: '/teams/:teamId/glasses',
    summary: 'Add a glass by its inside profile',
    tag,
    access: inTeam('edit-ingredients'),
    params: teamParams,
    body: GlassWriteSchema,
    response: { status: 201, schema: GlassSchema },
    handler: async (context, { body }) => {
      const glass = await addGlass(context, body);
      return { body: glass, revision: glass.revision };
    },
  }),
  route({
    operationId: 'updateGlass',
    method: 'put',
    path: '/teams/:teamId/glasses/:glassId',
    summary: 'Change a glass; versions keep the one they were saved with',
    tag,
    access: inTeam('edit-ingredients'),
    params: glassParams,
    body: GlassWriteSchema,
    ifMatch: true,
    response: { status: 200, schema: GlassSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const glass = await changeGlass(context, { glassId: params.glassId, write: body, ifMatch });
      return { body: glass, revision: glass.revision };
    },
  }),
  ...(['retire', 'restore'] as const).map((action) =>
    route({
      operationId: `${action}Glass`,
      method: 'post',
      path: `/teams/:teamId/glasses/:glassId/${action}`,
      summary: action === 'retire' ? 'Take a glass out of use' : 'Bring a retired glass back',
      tag,
      access: inTeam('edit-ingredients'),
      params: glassParams,
      ifMatch: true,
      response: { status: 200, schema: GlassSchema },
      handler: async (context, { params, ifMatch }) => {
        const retired = action === 'retire';
        const glass = await setGlassRetired(context, { glassId: params.glassId, retired, ifMatch });
        return { body: glass, revision: glass.revision };
      },
    }),
  ),
];
