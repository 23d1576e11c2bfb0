import { type EntityManager, OptimisticLockError } from '@mikro-orm/postgresql';

import { problems } from './problems.ts';

/** Refuses an edit that is based on another revision than the present one, with the resource as it stands. */
export function refuseStale(
  entity: { revision: number },
  { ifMatch, current }: { ifMatch: number; current: () => unknown },
): void {
  if (entity.revision !== ifMatch) throw problems.staleVersion(entity.revision, current());
}

/**
 * Flushes an edit. When somebody else's write came between reading and writing, the edit is stale after all, and
 * `reload` gives the resource as it stands now.
 */
export async function flushBased(
  em: EntityManager,
  reload: (fresh: EntityManager) => Promise<{ revision: number }>,
): Promise<void> {
  try {
    await em.flush();
  } catch (error) {
    if (!(error instanceof OptimisticLockError)) throw error;
    const current = await reload(em.fork());
    throw problems.staleVersion(current.revision, current);
  }
}
