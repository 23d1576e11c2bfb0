import type { EntityManager } from '@mikro-orm/postgresql';

import { problems } from '../../http/problems.ts';
import { Glass } from './glass.entity.ts';

/** A team keeps tens of glasses, not thousands: the list is not paged. */
const GLASS_LIMIT = 500;

export async function findGlasses(em: EntityManager, teamId: string): Promise<Glass[]> {
  return em.find(Glass, { team: teamId }, { orderBy: { name: 'asc', id: 'asc' }, limit: GLASS_LIMIT });
}

export function findGlass(
  em: EntityManager,
  input: { teamId: string; glassId: string },
): Promise<Glass | null> {
  return em.findOne(Glass, { id: input.glassId, team: input.teamId });
}

export async function loadGlass(
  em: EntityManager,
  input: { teamId: string; glassId: string },
): Promise<Glass> {
  const glass = await findGlass(em, input);
  if (glass === null) throw problems.notFound('glass', input.glassId);
  return glass;
}
