import { type EntityManager, raw } from '@mikro-orm/postgresql';

import { problems } from '../../http/problems.ts';
import { Glass } from './glass.entity.ts';

/** A team keeps tens of glasses, not thousands: the list is not paged. */
const GLASS_LIMIT = 500;

/** Every glass by name, letters before case as people sort. */
export function findGlasses(em: EntityManager, teamId: string): Promise<Glass[]> {
  return em
    .createQueryBuilder(Glass, 'g')
    .where({ team: teamId })
    .orderBy([{ [raw('g.name collate "und-x-icu"')]: 'asc' }, { id: 'asc' }])
    .limit(GLASS_LIMIT)
    .getResultList();
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
