import { type EntityManager, LockMode, raw } from '@mikro-orm/postgresql';

import { problems } from '../../http/problems.ts';
import { isUuid } from '../../http/uuid.ts';
import { SpecVersion, TastingNote } from './spec.entity.ts';

/** Versions of one spec in a list; older ones are still there by their id. */
const VERSION_LIMIT = 500;

const PEOPLE_AND_PARENT = ['spec', 'parent.spec', 'author', 'lockedBy'] as const;

interface OneVersion {
  teamId: string;
  versionId: string;
}

export async function loadVersion(
  em: EntityManager,
  { teamId, versionId }: OneVersion,
): Promise<SpecVersion> {
  const where = { id: versionId, team: teamId };
  const version = await em.findOne(SpecVersion, where, { populate: PEOPLE_AND_PARENT });
  if (version === null) throw problems.notFound('version', versionId);
  return version;
}

/** The version with its row held until the transaction ends. */
export async function loadVersionForChange(
  em: EntityManager,
  { teamId, versionId }: OneVersion,
): Promise<SpecVersion> {
  const options = { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true };
  const version = await em.findOne(SpecVersion, { id: versionId, team: teamId }, options);
  if (version === null) throw problems.notFound('version', versionId);
  return version;
}

/** Every version of a spec, the newest first. */
export function findVersionsOfSpec(
  em: EntityManager,
  { teamId, specId }: { teamId: string; specId: string },
): Promise<SpecVersion[]> {
  const where = { team: teamId, spec: specId };
  return em.find(SpecVersion, where, {
    populate: PEOPLE_AND_PARENT,
    orderBy: { number: 'desc' },
    limit: VERSION_LIMIT,
  });
}

/** Some versions in the order asked for; one that is not the team's is as unknown as one that does not exist. */
export async function loadVersions(
  em: EntityManager,
  { teamId, ids }: { teamId: string; ids: readonly string[] },
): Promise<SpecVersion[]> {
  const where = { team: teamId, id: { $in: ids.filter(isUuid) } };
  const found = await em.find(SpecVersion, where, { populate: PEOPLE_AND_PARENT, limit: ids.length });
  const byId = new Map(found.map((version) => [version.id, version]));
  return ids.map((id) => {
    const version = byId.get(id);
    if (version === undefined) throw problems.notFound('version', id);
    return version;
  });
}

/** How many tasting notes each of these versions has. */
export async function countNotes(
  em: EntityManager,
  versions: readonly SpecVersion[],
): Promise<Map<string, number>> {
  if (versions.length === 0) return new Map();
  const rows = await em
    .createQueryBuilder(TastingNote, 'n')
    .select([raw('n.version_id as version_id'), raw('count(*)::int as count')])
    .where({ version: { $in: versions.map((version) => version.id) } })
    .groupBy('n.version_id')
    .execute<{ version_id: string; count: number }[]>('all', false);
  return new Map(rows.map((row) => [row.version_id, row.count]));
}
