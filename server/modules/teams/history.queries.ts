import type { EntityManager } from '@mikro-orm/postgresql';

import { PAGE_LIMIT, type Page } from '#shared/contracts/common.ts';
import type { HistoryQuery } from '#shared/contracts/team.ts';

import { problems } from '../../http/problems.ts';
import { isUuid } from '../../http/uuid.ts';
import { AuditEvent } from './team.entity.ts';

/**
 * A page of a team's history, the newest first. Days are those of UTC, both ends included. The cursor is the id of
 * the last event shown: events are never deleted, and the database compares its time with all its digits.
 */
export async function findHistory(
  em: EntityManager,
  { teamId, query: { limit = PAGE_LIMIT.default, cursor, subjectId, from, to } }: HistoryRequest,
): Promise<Page<AuditEvent>> {
  refuseBackwards({ from, to });
  const builder = em.createQueryBuilder(AuditEvent, 'e').where({ team: teamId });
  if (subjectId !== undefined) builder.andWhere({ subjectId });
  if (from !== undefined) builder.andWhere(`e.at >= ?::date::timestamp at time zone 'UTC'`, [from]);
  if (to !== undefined) builder.andWhere(`e.at < (?::date + 1)::timestamp at time zone 'UTC'`, [to]);
  if (cursor !== undefined) {
    await refuseForeignCursor(em, { teamId, cursor });
    builder.andWhere('(e.at, e.id) < (select c.at, c.id from audit_event c where c.id = ?)', [cursor]);
  }
  const events = await builder
    .orderBy({ at: 'desc', id: 'desc' })
    .limit(limit + 1)
    .getResultList();
  const items = events.slice(0, limit);
  return { items, nextCursor: events.length > limit ? (items.at(-1)?.id ?? null) : null };
}

interface HistoryRequest {
  teamId: string;
  query: HistoryQuery;
}

function refuseBackwards({ from, to }: Pick<HistoryQuery, 'from' | 'to'>): void {
  if (from === undefined || to === undefined || from <= to) return;
  throw problems.invalidField('#/to', 'minimum', `to is ${to}; it must not be before ${from}.`);
}

async function refuseForeignCursor(
  em: EntityManager,
  { teamId, cursor }: { teamId: string; cursor: string },
): Promise<void> {
  const isKnown = isUuid(cursor) && (await em.count(AuditEvent, { id: cursor, team: teamId })) === 1;
  if (!isKnown)
    throw problems.invalidField('#/cursor', 'cursor', 'cursor is not one that this list gave out.');
}
