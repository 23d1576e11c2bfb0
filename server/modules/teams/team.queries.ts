import type { EntityManager } from '@mikro-orm/postgresql';

import { Membership } from './team.entity.ts';

/** The membership that lets a person act in a team, or null: the team then does not exist for them. */
export function findMembership(
  em: EntityManager,
  input: { teamId: string; userId: string },
): Promise<Membership | null> {
  if (!isUuid(input.teamId)) return Promise.resolve(null);
  return em.findOne(Membership, { team: input.teamId, user: input.userId });
}

function isUuid(text: string): boolean {
  return /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/i.test(text);
}
