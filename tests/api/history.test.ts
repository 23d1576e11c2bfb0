import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import type { HistoryEvent } from '#shared/contracts/team.ts';

import { AuditEvent } from '#server/modules/teams/team.entity.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';

let app: TestApp;
let team: TestTeam;
const SUBJECT = randomUUID();

beforeAll(async () => {
  app = await startTestApp();
  team = await app.addTeam();
  await addEvents(team);
  const other = await app.addTeam();
  await app.orm.em.getConnection().execute(
    `insert into audit_event (team_id, action, subject_type, subject_id, summary)
     values (?, 'spec.saved', 'spec', ?, 'of another team')`,
    [other.id, SUBJECT],
  );
});
afterAll(() => app.stop());

/** Twelve events: every three share one moment to the last microsecond, as those of one change do. */
async function addEvents({ id, members }: TestTeam): Promise<void> {
  const connection = app.orm.em.getConnection();
  for (let n = 0; n < 12; n += 1) {
    const at = `2026-03-0${1 + Math.floor(n / 3)}T23:59:59.99999${Math.floor(n / 3)}Z`;
    await connection.execute(
      `insert into audit_event (team_id, at, actor_id, actor_name, action, subject_type, subject_id, summary)
       values (?, ?, ?, 'Gull', 'spec.saved', 'spec', ?, ?)`,
      [id, at, members.developer.id, n % 2 === 0 ? SUBJECT : null, `event ${n}`],
    );
  }
}

async function pageOf(query: Record<string, string | number> = {}): Promise<Page<HistoryEvent>> {
  return (await team.as('manager').get<Page<HistoryEvent>>(`/teams/${team.id}/history`, { query })).body;
}

async function allPages(query: Record<string, string | number>): Promise<HistoryEvent[][]> {
  const pages: HistoryEvent[][] = [];
  let cursor: string | null = null;
  do {
    const page: Page<HistoryEvent> = await pageOf(cursor === null ? query : { ...query, cursor });
    pages.push(page.items);
    cursor = page.nextCursor;
  } while (cursor !== null && pages.length < 50);
  return pages;
}

const summaries = (events: HistoryEvent[]) => events.map(({ summary }) => summary);

describe('the history', () => {
  it('is listed with the newest first, and nothing of another team', async () => {
    const { items, nextCursor } = await pageOf();
    expect(nextCursor).toBeNull();
    expect(items).toHaveLength(12);
    expect(items.map(({ at }) => at)).toEqual(
      items
        .map(({ at }) => at)
        .toSorted()
        .reverse(),
    );
    expect(items[0]).toMatchObject({
      at: '2026-03-04T23:59:59.999Z',
      actor: { id: team.members.developer.id, name: 'Gull' },
      action: 'spec.saved',
      subjectType: 'spec',
    });
  });

  it.each([1, 2, 5, 11, 12, 13])('in pages of %i comes complete and without repeats', async (limit) => {
    const pages = await allPages({ limit });
    expect(pages.map((page) => page.length)).toEqual(
      Array.from({ length: Math.ceil(12 / limit) }, (_, index) => Math.min(limit, 12 - index * limit)),
    );
    expect(summaries(pages.flat())).toEqual(summaries((await pageOf()).items));
  });

  it('stays in step while new events come', async () => {
    const growing = await app.addTeam();
    await addEvents(growing);
    const pageAfter = async (cursor: Record<string, string>) => {
      const query = { limit: 6, ...cursor };
      const path = `/teams/${growing.id}/history`;
      return (await growing.as('manager').get<Page<HistoryEvent>>(path, { query })).body;
    };
    const first = await pageAfter({});
    await app.orm.em.fork().insert(AuditEvent, {
      team: growing.id,
      action: 'team.changed',
      subjectType: 'team',
      summary: 'meanwhile',
    });
    const second = await pageAfter({ cursor: first.nextCursor ?? '' });
    expect(new Set(summaries([...first.items, ...second.items])).size).toBe(12);
    expect(summaries(second.items)).not.toContain('meanwhile');
  });

  it('of one subject holds what happened to it', async () => {
    const { items } = await pageOf({ subjectId: SUBJECT });
    expect(items).toHaveLength(6);
    expect((await allPages({ subjectId: SUBJECT, limit: 4 })).map((page) => page.length)).toEqual([4, 2]);
    expect((await pageOf({ subjectId: randomUUID() })).items).toEqual([]);
  });

  it.each([
    [{ from: '2026-03-02', to: '2026-03-03' }, 6],
    [{ from: '2026-03-02', to: '2026-03-02' }, 3],
    [{ to: '2026-03-01' }, 3],
    [{ to: '2026-02-28' }, 0],
    [{ from: '0001-01-01', to: '9999-12-31' }, 12],
  ])('of the days %j holds the whole of both ends', async (days, count) => {
    expect((await pageOf(days)).items).toHaveLength(count);
  });

  it.each([
    [{ from: '2026-03-03', to: '2026-03-02' }, '#/to minimum'],
    [{ from: '2026-02-30' }, '#/from format'],
    [{ limit: 0 }, '#/limit minimum'],
    [{ limit: 201 }, '#/limit maximum'],
    [{ subjectId: 'x' }, '#/subjectId format'],
    [{ cursor: 'made up' }, '#/cursor cursor'],
    [{ cursor: randomUUID() }, '#/cursor cursor'],
    [{ cursor: '-'.repeat(36) }, '#/cursor cursor'],
  ])('asked for with %j is told at the field', async (query, error) => {
    const answer = await team.as('manager').get(`/teams/${team.id}/history`, { query });
    expect(answer.fieldErrors).toEqual([error]);
  });

  it("takes no cursor of another team's history", async () => {
    const other = await app.addTeam();
    const connection = app.orm.em.getConnection();
    const [row] = await connection.execute<{ id: string }[]>(
      `insert into audit_event (team_id, action, subject_type, summary)
       values (?, 'spec.saved', 'spec', 'theirs') returning id`,
      [other.id],
    );
    const answer = await team
      .as('manager')
      .get(`/teams/${team.id}/history`, { query: { cursor: row?.id ?? '' } });
    expect(answer.fieldErrors).toEqual(['#/cursor cursor']);
  });
});
