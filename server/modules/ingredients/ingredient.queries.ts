import { type EntityManager, raw } from '@mikro-orm/postgresql';

import { PAGE_LIMIT, type Page } from '#shared/contracts/common.ts';
import type { IngredientListQuery } from '#shared/contracts/ingredient.ts';

import { type CursorKind, containsPattern, decodeCursor, encodeCursor } from '../../http/cursor.ts';
import { problems } from '../../http/problems.ts';
import { Ingredient } from './ingredient.entity.ts';

/** A spec has at most 30 lines, and a comparison at most four specs. */
const BY_IDS_LIMIT = 200;

/** More ingredients than a back bar holds; an export and an import read them all. */
const WHOLE_BACK_BAR_LIMIT = 10_000;

/** The name, sorted as people sort: letters before case, accents beside their letter. */
const NAME = 'i.name collate "und-x-icu"';

type Sort = NonNullable<IngredientListQuery['sort']>;

/** What a list is sorted by, which way, and how a row's value is read for the cursor. */
const SORTS: Readonly<
  Record<
    Sort,
    { by: string; kind: CursorKind; descending: boolean; valueOf: (row: Ingredient) => string | number }
  >
> = {
  name: { by: NAME, kind: 'text', descending: false, valueOf: (row) => row.name },
  '-name': { by: NAME, kind: 'text', descending: true, valueOf: (row) => row.name },
  abv: { by: 'i.abv_fraction', kind: 'number', descending: false, valueOf: (row) => row.abvFraction },
  '-abv': { by: 'i.abv_fraction', kind: 'number', descending: true, valueOf: (row) => row.abvFraction },
  sugar: { by: 'i.sugar_g_per_l', kind: 'number', descending: false, valueOf: (row) => row.sugarGPerL },
  '-sugar': { by: 'i.sugar_g_per_l', kind: 'number', descending: true, valueOf: (row) => row.sugarGPerL },
  acid: {
    by: 'i.acid_citric_g_per_l',
    kind: 'number',
    descending: false,
    valueOf: (row) => row.acidCitricGPerL,
  },
  '-acid': {
    by: 'i.acid_citric_g_per_l',
    kind: 'number',
    descending: true,
    valueOf: (row) => row.acidCitricGPerL,
  },
  '-updated': {
    by: "date_trunc('milliseconds', i.updated_at)",
    kind: 'time',
    descending: true,
    valueOf: (row) => row.updatedAt.toISOString(),
  },
};

/** A page of the back bar, found, filtered and sorted by the database. */
export async function listIngredients(
  em: EntityManager,
  { teamId, query }: { teamId: string; query: IngredientListQuery },
): Promise<Page<Ingredient>> {
  const { sort = 'name', limit = PAGE_LIMIT.default, retired = 'no' } = query;
  const { by, kind, descending, valueOf } = SORTS[sort];
  const builder = em.createQueryBuilder(Ingredient, 'i').where({ team: teamId });
  if (retired !== 'all') builder.andWhere({ retiredAt: retired === 'only' ? { $ne: null } : null });
  if (query.category !== undefined) builder.andWhere({ category: query.category });
  if (query.search?.trim()) builder.andWhere('lower(i.name) like ?', [containsPattern(query.search)]);
  const cursor = decodeCursor(query.cursor, sort, kind);
  if (cursor !== null)
    builder.andWhere(`(${by}, i.id) ${descending ? '<' : '>'} (?, ?)`, [cursor.value, cursor.id]);
  const direction = descending ? 'desc' : 'asc';
  const rows = await builder
    .orderBy([{ [raw(by)]: direction }, { id: direction }])
    .limit(limit + 1)
    .getResultList();
  const items = rows.slice(0, limit);
  const last = rows.length > limit ? items.at(-1) : undefined;
  return { items, nextCursor: last ? encodeCursor({ sort, value: valueOf(last), id: last.id }) : null };
}

/** Ingredients of the team by id, retired ones too. An id of another team finds nothing. */
export function findIngredients(
  em: EntityManager,
  { teamId, ids }: { teamId: string; ids: readonly string[] },
): Promise<Ingredient[]> {
  return em.find(Ingredient, { team: teamId, id: { $in: [...ids] } }, { limit: BY_IDS_LIMIT });
}

export async function loadIngredient(
  em: EntityManager,
  { teamId, ingredientId }: { teamId: string; ingredientId: string },
): Promise<Ingredient> {
  const ingredient = await em.findOne(Ingredient, { id: ingredientId, team: teamId });
  if (ingredient === null) throw problems.notFound('ingredient', ingredientId);
  return ingredient;
}

/**
 * Holds the team's back bar until the transaction ends: changes come one after the other, so that a name that was free a moment
 * ago is still free, and two imports of one file add its rows once.
 */
export async function holdBackBar(em: EntityManager, teamId: string): Promise<void> {
  await em.execute('select pg_advisory_xact_lock(hashtextextended(?, 0))', [`back bar of ${teamId}`]);
}

/** Another ingredient in use under the same name, whatever its letters' case. */
export function findNamesake(
  em: EntityManager,
  { teamId, name, exceptId }: { teamId: string; name: string; exceptId: string | null },
): Promise<Ingredient | null> {
  return em
    .createQueryBuilder(Ingredient, 'i')
    .where({ team: teamId, retiredAt: null, ...(exceptId === null ? {} : { id: { $ne: exceptId } }) })
    .andWhere('lower(i.name) = lower(?)', [name.trim()])
    .limit(1)
    .getSingleResult();
}

/** The whole back bar in use, by name. */
export function findBackBar(em: EntityManager, teamId: string): Promise<Ingredient[]> {
  return em
    .createQueryBuilder(Ingredient, 'i')
    .where({ team: teamId, retiredAt: null })
    .orderBy([{ [raw(NAME)]: 'asc' }, { id: 'asc' }])
    .limit(WHOLE_BACK_BAR_LIMIT)
    .getResultList();
}
