import { Type } from '@sinclair/typebox';

import { AccountSchema, InvitationPreviewSchema } from '#shared/contracts/account.ts';

import { type AnyRoute, PUBLIC, SIGNED_IN, route } from '../../http/route.ts';
import { acceptInvitation, findOpenInvitation, toInvitationPreview } from '../teams/index.ts';
import { INVITATION_LIMITS } from './account.limits.ts';
import { toAccount } from './account.mapper.ts';
import { loadPerson } from './account.queries.ts';

const tag = 'Invitations';
const params = Type.Object({ invitationToken: Type.String({ pattern: '^[A-Za-z0-9_-]{20,200}$' }) });

/** What the holder of a link may do with it. Managers' routes for invitations are in the teams module. */
export const invitationRoutes: AnyRoute[] = [
  route({
    operationId: 'getInvitation',
    method: 'get',
    path: '/invitations/:invitationToken',
    summary: 'What an invitation link offers',
    tag,
    access: PUBLIC,
    limits: INVITATION_LIMITS,
    params,
    response: { status: 200, schema: InvitationPreviewSchema },
    handler: async ({ em, now }, { params }) => ({
      body: toInvitationPreview(await findOpenInvitation(em, { token: params.invitationToken, now: now() })),
    }),
  }),
  route({
    operationId: 'acceptInvitation',
    method: 'post',
    path: '/invitations/:invitationToken/accept',
    summary: 'Join the team, or add the roles to those already held',
    tag,
    access: SIGNED_IN,
    limits: INVITATION_LIMITS,
    params,
    response: { status: 200, schema: AccountSchema },
    handler: async ({ em, now, person }, { params }) => {
      await acceptInvitation(em, { token: params.invitationToken, now: now(), person });
      return { body: toAccount(await loadPerson(em, person.id)) };
    },
  }),
];
