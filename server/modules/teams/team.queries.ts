import type { EntityManager } from '@mikro-orm/postgresql';

import type { Role } from '#shared/contracts/roles.ts';

import { problems } from '../../http/problems.ts';
import { isUuid } from '../../http/uuid.ts';
import { Membership, Team } from './team.entity.ts';

/** More people or teams than anybody has; lists of them are not paged. */
const MAX_MEMBERS = 1000;
const MAX_TEAMS_OF_PERSON = 200;

/** The membership that lets a person act in a team, or null: the team then does not exist for them. */
export function findMembership(
  em: EntityManager,
  input: { teamId: string; userId: string },
): Promise<Membership | null> {
  if (!isUuid(input.teamId)) return Promise.resolve(null);
  return em.findOne(Membership, { team: input.teamId, user: input.userId });
}

export interface TeamOfPerson {
  teamId: string;
  teamName: string;
  roles: readonly Role[];
}

/** The teams of a person, by name. */
export async function findTeamsOf(em: EntityManager, userId: string): Promise<TeamOfPerson[]> {
  const memberships = await em.find(
    Membership,
    { user: userId },
    { populate: ['team'], orderBy: [{ team: { name: 'asc' } }, { id: 'asc' }], limit: MAX_TEAMS_OF_PERSON },
  );
  return memberships.map(({ team, roles }) => ({ teamId: team.id, teamName: team.name, roles }));
}

export async function loadTeam(em: EntityManager, teamId: string): Promise<Team> {
  const team = await em.findOne(Team, { id: teamId });
  if (team === null) throw problems.notFound('team', teamId);
  return team;
}

/** The members in the order of their names. */
export function findMembers(em: EntityManager, teamId: string): Promise<Membership[]> {
  return em.find(
    Membership,
    { team: teamId },
    { populate: ['user'], orderBy: [{ user: { name: 'asc' } }, { id: 'asc' }], limit: MAX_MEMBERS },
  );
}

export async function loadMember(
  em: EntityManager,
  { teamId, memberId }: { teamId: string; memberId: string },
): Promise<Membership> {
  const member = await em.findOne(Membership, { id: memberId, team: teamId }, { populate: ['user'] });
  if (member === null) throw problems.notFound('member', memberId);
  return member;
}

/** How many managers there would be without this member. */
export function countOtherManagers(
  em: EntityManager,
  { teamId, memberId }: { teamId: string; memberId: string },
): Promise<number> {
  return em.count(Membership, { team: teamId, id: { $ne: memberId }, roles: { $contains: ['manager'] } });
}
