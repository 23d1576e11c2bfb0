import { type EntityManager, LockMode } from '@mikro-orm/postgresql';

import type { Role } from '#shared/contracts/roles.ts';
import type { Member } from '#shared/contracts/team.ts';

import { problems } from '../../http/problems.ts';
import { refuseStale } from '../../http/revision.ts';
import type { TeamContext } from '../../http/route.ts';
import { recordEvent } from './history.service.ts';
import { type Membership, Team } from './team.entity.ts';
import { toMember } from './team.mapper.ts';
import { countOtherManagers, loadMember } from './team.queries.ts';

interface BasedMember {
  memberId: string;
  ifMatch: number;
}

/** Gives a member other roles. */
export function changeRoles(
  context: TeamContext,
  { roles, ...based }: BasedMember & { roles: Role[] },
): Promise<Member> {
  return withMemberHeld(context, based, async (em, member) => {
    const before = member.roles;
    if (sameRoles(before, roles)) return toMember(member, { withEmail: true });
    if (!roles.includes('manager')) await keepOneManager(em, member);
    member.roles = roles;
    record(em, context, member, {
      action: 'member.roles-changed',
      summary: `Roles of ${member.user.name}: ${before.join(', ')} → ${roles.join(', ')}`,
    });
    await em.flush();
    return toMember(member, { withEmail: true });
  });
}

/** Ends a membership; what the person made stays. */
export function removeMember(context: TeamContext, based: BasedMember): Promise<void> {
  return withMemberHeld(context, based, async (em, member) => {
    await keepOneManager(em, member);
    em.remove(member);
    record(em, context, member, {
      action: 'member.removed',
      summary: `Took ${member.user.name} out of the team`,
    });
    await em.flush();
  });
}

/**
 * Changes of members happen one after the other in a team, held by a lock on its row: two managers who end each
 * other's role at the same moment must not both succeed.
 */
function withMemberHeld<Result>(
  { em, teamId }: TeamContext,
  { memberId, ifMatch }: BasedMember,
  change: (em: EntityManager, member: Membership) => Promise<Result>,
): Promise<Result> {
  return em.fork().transactional(async (transaction) => {
    await transaction.findOneOrFail(Team, { id: teamId }, { lockMode: LockMode.PESSIMISTIC_WRITE });
    const member = await loadMember(transaction, { teamId, memberId });
    refuseStale(member, { ifMatch, current: () => toMember(member, { withEmail: true }) });
    return change(transaction, member);
  });
}

async function keepOneManager(em: EntityManager, member: Membership): Promise<void> {
  if (!member.roles.includes('manager')) return;
  const others = await countOtherManagers(em, { teamId: member.team.id, memberId: member.id });
  if (others > 0) return;
  throw problems.notAllowedInState(
    `${member.user.name} is the only manager. Make somebody else a manager first.`,
  );
}

function record(
  em: EntityManager,
  { teamId, person }: TeamContext,
  member: Membership,
  event: { action: string; summary: string },
): void {
  recordEvent(em, { teamId, person, ...event, subjectType: 'member', subjectId: member.id });
}

function sameRoles(a: readonly Role[], b: readonly Role[]): boolean {
  return a.length === b.length && a.every((role) => b.includes(role));
}
