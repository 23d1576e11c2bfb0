import { Type } from '@sinclair/typebox';

import { PUBLIC, type AnyRoute, route } from './route.ts';

const HealthSchema = Type.Object(
  { status: Type.Literal('ok'), database: Type.Literal('ok') },
  { $id: 'Health', additionalProperties: false },
);

export const healthRoutes: AnyRoute[] = [
  route({
    operationId: 'getHealth',
    method: 'get',
    path: '/health',
    summary: 'Whether the server and its database answer',
    tag: 'System',
    access: PUBLIC,
    response: { status: 200, schema: HealthSchema },
    handler: async ({ em }) => {
      await em.getConnection().execute('select 1');
      return { body: { status: 'ok', database: 'ok' } };
    },
  }),
];
