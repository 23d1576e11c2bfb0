import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import { hasPermission } from '#shared/contracts/roles.ts';
import {
  InvitationCreateSchema,
  InvitationCreatedSchema,
  InvitationListSchema,
  MemberListSchema,
  MemberSchema,
  MemberUpdateSchema,
} from '#shared/contracts/team.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { findOpenInvitations } from './invitation.queries.ts';
import { createInvitation, withdrawInvitation } from './invitation.service.ts';
import { changeRoles, removeMember } from './member.service.ts';
import { toInvitation, toMember } from './team.mapper.ts';
import { findMembers } from './team.queries.ts';

const memberTag = 'Members';
const invitationTag = 'Invitations';
const teamParams = Type.Object({ teamId: Uuid });
const memberParams = Type.Object({ teamId: Uuid, memberId: Uuid });
const invitationParams = Type.Object({ teamId: Uuid, invitationId: Uuid });

export const memberRoutes: AnyRoute[] = [
  route({
    operationId: 'listMembers',
    method: 'get',
    path: '/teams/:teamId/members',
    summary: 'The members and their roles; addresses only for managers',
    tag: memberTag,
    access: inTeam('read'),
    params: teamParams,
    response: { status: 200, schema: MemberListSchema },
    handler: async ({ em, teamId, roles }) => {
      const withEmail = hasPermission(roles, 'manage-team');
      const members = await findMembers(em, teamId);
      return { body: { items: members.map((member) => toMember(member, { withEmail })) } };
    },
  }),
  route({
    operationId: 'updateMember',
    method: 'put',
    path: '/teams/:teamId/members/:memberId',
    summary: 'Set the roles of a member; one manager must be left',
    tag: memberTag,
    access: inTeam('manage-team'),
    params: memberParams,
    body: MemberUpdateSchema,
    ifMatch: true,
    response: { status: 200, schema: MemberSchema },
    handler: async (context, { params: { memberId }, body, ifMatch }) => {
      const member = await changeRoles(context, { memberId, ifMatch, roles: body.roles });
      return { body: member, revision: member.revision };
    },
  }),
  route({
    operationId: 'removeMember',
    method: 'delete',
    path: '/teams/:teamId/members/:memberId',
    summary: 'Take a member out of the team; one manager must be left',
    tag: memberTag,
    access: inTeam('manage-team'),
    params: memberParams,
    ifMatch: true,
    response: { status: 204, schema: null },
    handler: async (context, { params: { memberId }, ifMatch }) => {
      await removeMember(context, { memberId, ifMatch });
      return {};
    },
  }),
  route({
    operationId: 'listInvitations',
    method: 'get',
    path: '/teams/:teamId/invitations',
    summary: 'The open invitations, the newest first',
    tag: invitationTag,
    access: inTeam('manage-team'),
    params: teamParams,
    response: { status: 200, schema: InvitationListSchema },
    handler: async ({ em, now, teamId }) => {
      const invitations = await findOpenInvitations(em, { teamId, now: now() });
      return { body: { items: invitations.map(toInvitation) } };
    },
  }),
  route({
    operationId: 'createInvitation',
    method: 'post',
    path: '/teams/:teamId/invitations',
    summary: 'Make a link into the team, valid once and for 7 days; its token is shown only here',
    tag: invitationTag,
    access: inTeam('manage-team'),
    params: teamParams,
    body: InvitationCreateSchema,
    response: { status: 201, schema: InvitationCreatedSchema },
    handler: async (context, { body }) => ({ body: await createInvitation(context, body) }),
  }),
  route({
    operationId: 'withdrawInvitation',
    method: 'delete',
    path: '/teams/:teamId/invitations/:invitationId',
    summary: 'Withdraw an open invitation',
    tag: invitationTag,
    access: inTeam('manage-team'),
    params: invitationParams,
    response: { status: 204, schema: null },
    handler: async (context, { params: { invitationId } }) => {
      await withdrawInvitation(context, invitationId);
      return {};
    },
  }),
];
