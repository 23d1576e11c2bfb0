import type { InvitationPreview } from '#shared/contracts/account.ts';
import type { PersonRef } from '#shared/contracts/common.ts';
import type { HistoryEvent, Invitation, Member, Team } from '#shared/contracts/team.ts';

import type * as entities from './team.entity.ts';

export function toTeam(team: entities.Team): Team {
  const { dashMl, barSpoonMl, dropMl } = team.houseMeasures;
  return {
    id: team.id,
    revision: team.revision,
    name: team.name,
    country: team.country,
    currency: team.currency,
    houseMeasures: { dashMl, barSpoonMl, dropMl },
    createdAt: team.createdAt.toISOString(),
  };
}

/** E-mail addresses are for those who manage the team. */
export function toMember(member: entities.Membership, { withEmail }: { withEmail: boolean }): Member {
  return {
    id: member.id,
    revision: member.revision,
    person: { id: member.user.id, name: member.user.name },
    email: withEmail ? member.user.email : null,
    roles: [...member.roles],
    joinedAt: member.joinedAt.toISOString(),
  };
}

export function toInvitation(invitation: entities.Invitation): Invitation {
  return {
    id: invitation.id,
    label: invitation.label,
    roles: [...invitation.roles],
    createdAt: invitation.createdAt.toISOString(),
    expiresAt: invitation.expiresAt.toISOString(),
    createdBy: toPersonRef(invitation.createdBy),
  };
}

export function toInvitationPreview(invitation: entities.Invitation): InvitationPreview {
  return {
    teamName: invitation.team.name,
    roles: [...invitation.roles],
    expiresAt: invitation.expiresAt.toISOString(),
    invitedBy: invitation.createdBy?.name ?? null,
  };
}

export function toHistoryEvent(event: entities.AuditEvent): HistoryEvent {
  const { actorId, actorName } = event;
  return {
    id: event.id,
    at: event.at.toISOString(),
    actor: actorId && actorName ? { id: actorId, name: actorName } : null,
    action: event.action,
    subjectType: event.subjectType,
    subjectId: event.subjectId ?? null,
    summary: event.summary,
  };
}

function toPersonRef(user: { id: string; name: string } | null | undefined): PersonRef | null {
  return user ? { id: user.id, name: user.name } : null;
}
