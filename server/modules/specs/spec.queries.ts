import { type EntityManager, LockMode } from '@mikro-orm/postgresql';

import { PAGE_LIMIT, type Page } from '#shared/contracts/common.ts';
import type { SpecListQuery } from '#shared/contracts/spec.ts';

import { type CursorKind, containsPattern, decodeCursor, encodeCursor } from '../../http/cursor.ts';
import { problems } from '../../http/problems.ts';
import { Spec } from './spec.entity.ts';
import type { Sibling, SpecRow } from './spec.mapper.ts';

/** A family with more variants than this is a back bar, not a drink. */
const SIBLING_LIMIT = 100;

type Sort = NonNullable<SpecListQuery['sort']>;

const NAME = 's.name collate "und-x-icu"';
const ABV = 'coalesce(s.abv_fraction, -1)';

/** What a list is sorted by, which way, and how a row's value is read for the cursor. */
const SORTS: Readonly<
  Record<
    Sort,
    { by: string; kind: CursorKind; descending: boolean; valueOf: (row: SpecRow) => string | number }
  >
> = {
  '-updated': {
    by: 's.updated_at',
    kind: 'time',
    descending: true,
    valueOf: (row) => new Date(row.updated_at_ms).toISOString(),
  },
  name: { by: NAME, kind: 'text', descending: false, valueOf: (row) => row.name },
  '-name': { by: NAME, kind: 'text', descending: true, valueOf: (row) => row.name },
  abv: { by: ABV, kind: 'number', descending: false, valueOf: (row) => row.abv_fraction ?? -1 },
  '-abv': { by: ABV, kind: 'number', descending: true, valueOf: (row) => row.abv_fraction ?? -1 },
};

/** Columns a list shows; drafts stay in the database. */
const SUMMARY_COLUMNS = `s.id, s.revision, s.family_id, s.name, s.variant_name, s.latest_version_id, s.latest_number,
  s.latest_state, s.locked_version_id, s.locked_number, s.final_ml, s.abv_fraction, s.sugar_g_per_l,
  s.acid_citric_g_per_l, trunc(extract(epoch from s.updated_at) * 1000)::float8 as updated_at_ms,
  trunc(extract(epoch from s.retired_at) * 1000)::float8 as retired_at_ms, u.id as updated_by_id, u.name as updated_by_name`;

const RETIRED: Readonly<Record<NonNullable<SpecListQuery['retired']>, string>> = {
  no: 'and s.retired_at is null',
  only: 'and s.retired_at is not null',
  all: '',
};

/**
 * A page of the team's specs, found, filtered and sorted by the database. The rows are read as they are: making entities of them
 * takes several times as long as the statement, and a list changes none.
 */
export async function listSpecs(
  em: EntityManager,
  { teamId, query }: { teamId: string; query: SpecListQuery },
): Promise<Page<SpecRow>> {
  const { sort = '-updated', limit = PAGE_LIMIT.default } = query;
  const { by, descending, valueOf } = SORTS[sort];
  const { conditions, values } = conditionsOf(query, sort);
  const direction = descending ? 'desc' : 'asc';
  const rows = await em.execute<SpecRow[]>(
    `select ${SUMMARY_COLUMNS} from spec s left join app_user u on u.id = s.updated_by_id
     where s.team_id = ? ${conditions.join(' ')} order by ${by} ${direction}, s.id ${direction} limit ?`,
    [teamId, ...values, limit + 1],
  );
  const items = rows.slice(0, limit);
  const last = rows.length > limit ? items.at(-1) : undefined;
  return { items, nextCursor: last ? encodeCursor({ sort, value: valueOf(last), id: last.id }) : null };
}

/** What a query leaves of the team's specs: fixed words of SQL, with a place for each value. */
function conditionsOf(
  query: SpecListQuery,
  sort: Sort,
): { conditions: string[]; values: (string | number)[] } {
  const { by, kind, descending } = SORTS[sort];
  const conditions = [RETIRED[query.retired ?? 'no']];
  const values: (string | number)[] = [];
  if (query.state !== undefined) {
    conditions.push('and s.latest_state = ?');
    values.push(query.state);
  }
  if (query.search?.trim()) {
    conditions.push("and lower(s.name || ' ' || coalesce(s.variant_name, '')) like ?");
    values.push(containsPattern(query.search));
  }
  const cursor = decodeCursor(query.cursor, sort, kind);
  if (cursor !== null) {
    conditions.push(`and (${by}, s.id) ${descending ? '<' : '>'} (?, ?)`);
    values.push(cursor.value, cursor.id);
  }
  return { conditions, values };
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
