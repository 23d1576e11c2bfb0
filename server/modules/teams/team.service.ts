import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import type { Team as TeamResource, TeamUpdate } from '#shared/contracts/team.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';

import { flushBased, refuseStale } from '../../http/revision.ts';
import type { SignedInPerson, TeamContext } from '../../http/route.ts';
import { stockGlasses } from '../glasses/index.ts';
import { stockTeam } from '../ingredients/index.ts';
import { recordEvent } from './history.service.ts';
import { Membership, Team } from './team.entity.ts';
import { toTeam } from './team.mapper.ts';
import { loadTeam } from './team.queries.ts';

/** Adds a team with its creator as manager, the generic back bar and the common glasses; the caller flushes. */
export function createTeam(
  em: EntityManager,
  { name, creator, at }: { name: string; creator: Pick<SignedInPerson, 'id' | 'name'>; at?: Date },
): Team {
  const team = em.create(Team, {
    id: randomUUID(),
    name: name.trim(),
    country: 'WHO',
    currency: 'EUR',
    houseMeasures: { ...DEFAULT_HOUSE_MEASURES },
    ...(at && { createdAt: at }),
  });
  em.create(Membership, { team, user: creator.id, roles: ['manager'] });
  stockTeam(em, team.id);
  stockGlasses(em, team.id);
  recordEvent(em, {
    teamId: team.id,
    person: creator,
    action: 'team.created',
    subjectType: 'team',
    subjectId: team.id,
    summary: `Made the team ${team.name}`,
    ...(at && { at }),
  });
  return team;
}

export async function changeTeam(
  { em, teamId, person }: TeamContext,
  { change, ifMatch }: { change: TeamUpdate; ifMatch: number },
): Promise<TeamResource> {
  const team = await loadTeam(em, teamId);
  refuseStale(team, { ifMatch, current: () => toTeam(team) });
  const before = toTeam(team);
  const { name, country, currency, houseMeasures } = change;
  em.assign(team, { name: name.trim(), country, currency, houseMeasures: { ...houseMeasures } });
  const summary = describeTeamChange(before, toTeam(team));
  if (summary === null) return before;
  recordEvent(em, {
    teamId,
    person,
    action: 'team.changed',
    subjectType: 'team',
    subjectId: teamId,
    summary,
  });
  await flushBased(em, async (fresh) => toTeam(await loadTeam(fresh, teamId)));
  return toTeam(team);
}

/** The fields that differ, in words; null when none does. */
function describeTeamChange(before: TeamResource, after: TeamResource): string | null {
  const pairs: [string, string | number, string | number][] = [
    ['name', before.name, after.name],
    ['country', before.country, after.country],
    ['currency', before.currency, after.currency],
    ['dash', `${before.houseMeasures.dashMl} ml`, `${after.houseMeasures.dashMl} ml`],
    ['bar spoon', `${before.houseMeasures.barSpoonMl} ml`, `${after.houseMeasures.barSpoonMl} ml`],
    ['drop', `${before.houseMeasures.dropMl} ml`, `${after.houseMeasures.dropMl} ml`],
  ];
  const words = pairs
    .filter(([, was, is]) => was !== is)
    .map(([field, was, is]) => `${field} ${was} → ${is}`);
  return words.length === 0 ? null : `Changed the team: ${words.join(', ')}`;
}
