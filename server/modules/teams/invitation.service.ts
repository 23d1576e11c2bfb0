import { randomBytes, randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import { ROLES } from '#shared/contracts/roles.ts';
import type { InvitationCreate, InvitationCreated } from '#shared/contracts/team.ts';

import { problems } from '../../http/problems.ts';
import type { SignedInPerson, TeamContext } from '../../http/route.ts';
import { User } from '../accounts/account.entity.ts';
import { recordEvent } from './history.service.ts';
import {
  MAX_OPEN_INVITATIONS,
  type OfferedToken,
  consumeInvitation,
  findOpenInvitation,
  findOpenInvitations,
  storedToken,
} from './invitation.queries.ts';
import { Invitation, Membership } from './team.entity.ts';
import { toInvitation } from './team.mapper.ts';

const DAYS_VALID = 7;
const DAY_MS = 86_400_000;
const TOKEN_BYTES = 32;

/** Makes a one-time link. Its token is in this answer and nowhere else. */
export async function createInvitation(
  { em, now, teamId, person }: TeamContext,
  { label, roles }: InvitationCreate,
): Promise<InvitationCreated> {
  const open = await findOpenInvitations(em, { teamId, now: now() });
  if (open.length >= MAX_OPEN_INVITATIONS) {
    throw problems.notAllowedInState(`There are ${open.length} open invitations. Withdraw some first.`);
  }
  const token = randomBytes(TOKEN_BYTES).toString('base64url');
  const invitation = em.create(Invitation, {
    id: randomUUID(),
    team: teamId,
    label: label.trim(),
    roles,
    tokenHash: storedToken(token),
    createdBy: await em.findOneOrFail(User, { id: person.id }),
    createdAt: now(),
    expiresAt: new Date(now().getTime() + DAYS_VALID * DAY_MS),
  });
  recordEvent(em, {
    teamId,
    person,
    action: 'invitation.created',
    subjectType: 'invitation',
    subjectId: invitation.id,
    summary: `Made an invitation for ${invitation.label}: ${roles.join(', ')}`,
  });
  await em.flush();
  return { invitation: toInvitation(invitation), token };
}

/** Withdraws an open link. */
export async function withdrawInvitation(
  { em, now, teamId, person }: TeamContext,
  invitationId: string,
): Promise<void> {
  const invitation = await em.findOne(Invitation, {
    id: invitationId,
    team: teamId,
    usedAt: null,
    expiresAt: { $gt: now() },
  });
  if (invitation === null) throw problems.notFound('invitation', invitationId);
  em.remove(invitation);
  recordEvent(em, {
    teamId,
    person,
    action: 'invitation.withdrawn',
    subjectType: 'invitation',
    subjectId: invitationId,
    summary: `Withdrew the invitation for ${invitation.label}`,
  });
  await em.flush();
}

type Joining = OfferedToken & { person: Pick<SignedInPerson, 'id' | 'name'> };

/** Uses up the link and adds its roles to the person's. Call it in a transaction, so that no link is lost in vain. */
export async function joinByInvitation(em: EntityManager, { person, ...offered }: Joining): Promise<void> {
  const invitation = await findOpenInvitation(em, offered);
  await consumeInvitation(em, offered);
  const teamId = invitation.team.id;
  const member = await em.findOne(Membership, { team: teamId, user: person.id });
  if (member === null) {
    em.create(Membership, { team: teamId, user: person.id, roles: invitation.roles });
  } else {
    member.roles = ROLES.filter((role) => member.roles.includes(role) || invitation.roles.includes(role));
  }
  recordEvent(em, {
    teamId,
    person,
    action: 'member.joined',
    subjectType: 'invitation',
    subjectId: invitation.id,
    summary: `${person.name} joined by the invitation for ${invitation.label}: ${invitation.roles.join(', ')}`,
  });
}

export function acceptInvitation(em: EntityManager, joining: Joining): Promise<void> {
  return em.transactional((transaction) => joinByInvitation(transaction, joining));
}
