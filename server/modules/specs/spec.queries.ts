import { type EntityManager, LockMode, raw } from '@mikro-orm/postgresql';

import { PAGE_LIMIT, type Page } from '#shared/contracts/common.ts';
import type { SpecListQuery } from '#shared/contracts/spec.ts';

import { type CursorKind, containsPattern, decodeCursor, encodeCursor } from '../../http/cursor.ts';
import { problems } from '../../http/problems.ts';
import { Spec } from './spec.entity.ts';
import type { Sibling } from './spec.mapper.ts';

/** A family with more variants than this is a back bar, not a drink. */
const SIBLING_LIMIT = 100;

type Sort = NonNullable<SpecListQuery['sort']>;

const NAME = 's.name collate "und-x-icu"';
const ABV = 'coalesce(s.abv_fraction, -1)';

/** What a list is sorted by, which way, and how a row's value is read for the cursor. */
const SORTS: Readonly<
  Record<Sort, { by: string; kind: CursorKind; descending: boolean; valueOf: (row: Spec) => string | number }>
> = {
  '-updated': {
    by: 's.updated_at',
    kind: 'time',
    descending: true,
    valueOf: (row) => row.updatedAt.toISOString(),
  },
  name: { by: NAME, kind: 'text', descending: false, valueOf: (row) => row.name },
  '-name': { by: NAME, kind: 'text', descending: true, valueOf: (row) => row.name },
  abv: { by: ABV, kind: 'number', descending: false, valueOf: (row) => row.abvFraction ?? -1 },
  '-abv': { by: ABV, kind: 'number', descending: true, valueOf: (row) => row.abvFraction ?? -1 },
};

/** Columns a list shows; drafts stay in the database. */
const SUMMARY_FIELDS = [
  'id',
  'revision',
  'familyId',
  'name',
  'variantName',
  'latestVersionId',
  'latestNumber',
  'latestState',
  'lockedVersionId',
  'lockedNumber',
  'finalMl',
  'abvFraction',
  'sugarGPerL',
  'acidCitricGPerL',
  'updatedAt',
  'updatedBy.id',
  'updatedBy.name',
  'retiredAt',
] as const;

/** A page of the team's specs, found, filtered and sorted by the database. */
export async function listSpecs(
  em: EntityManager,
  { teamId, query }: { teamId: string; query: SpecListQuery },
): Promise<Page<Spec>> {
  const { sort = '-updated', limit = PAGE_LIMIT.default, retired = 'no' } = query;
  const { by, kind, descending, valueOf } = SORTS[sort];
  const builder = em
    .createQueryBuilder(Spec, 's')
    .select(SUMMARY_FIELDS.filter((field) => !field.startsWith('updatedBy')) as never)
    .leftJoinAndSelect('s.updatedBy', 'u', {}, ['id', 'name'])
    .where({ team: teamId });
  if (retired !== 'all') builder.andWhere({ retiredAt: retired === 'only' ? { $ne: null } : null });
  if (query.state !== undefined) builder.andWhere({ latestState: query.state });
  if (query.search?.trim()) {
    const searched = "lower(s.name || ' ' || coalesce(s.variant_name, '')) like ?";
    builder.andWhere(searched, [containsPattern(query.search)]);
  }
  const cursor = decodeCursor(query.cursor, sort, kind);
  if (cursor !== null)
    builder.andWhere(`(${by}, s.id) ${descending ? '<' : '>'} (?, ?)`, [cursor.value, cursor.id]);
  const direction = descending ? 'desc' : 'asc';
  const rows = await builder
    .orderBy([{ [raw(by)]: direction }, { id: direction }])
    .limit(limit + 1)
    .getResultList();
  const items = rows.slice(0, limit);
  const last = rows.length > limit ? items.at(-1) : undefined;
  return { items, nextCursor: last ? encodeCursor({ sort, value: valueOf(last), id: last.id }) : null };
}

interface OneSpec {
  teamId: string;
  specId: string;
}

export async function loadSpec(em: EntityManager, { teamId, specId }: OneSpec): Promise<Spec> {
  const spec = await em.findOne(Spec, { id: specId, team: teamId }, { populate: ['updatedBy'] });
  if (spec === null) throw problems.notFound('spec', specId);
  return spec;
}

/** The spec with its row held until the transaction ends, so that two saves come one after the other. */
export async function loadSpecForChange(em: EntityManager, { teamId, specId }: OneSpec): Promise<Spec> {
  const options = { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true };
  const spec = await em.findOne(Spec, { id: specId, team: teamId }, options);
  if (spec === null) throw problems.notFound('spec', specId);
  return spec;
}

/** The other variants of the same drink. */
export async function findSiblings(em: EntityManager, spec: Spec): Promise<Sibling[]> {
  const where = { team: spec.team.id, familyId: spec.familyId, id: { $ne: spec.id }, retiredAt: null };
  const siblings = await em.find(Spec, where, {
    fields: ['id', 'name', 'variantName'],
    orderBy: { createdAt: 'asc', id: 'asc' },
    limit: SIBLING_LIMIT,
  });
  return siblings.map(({ id, name, variantName }) => ({ id, name, variantName: variantName ?? null }));
}
