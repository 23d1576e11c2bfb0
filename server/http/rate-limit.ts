import { createHash } from 'node:crypto';

import type { MikroORM } from '@mikro-orm/postgresql';
import type { Request, RequestHandler } from 'express';
import { type ClientRateLimitInfo, type Store, ipKeyGenerator, rateLimit } from 'express-rate-limit';

import { problems } from './problems.ts';
import type { RouteLimit } from './route.ts';

/** Counts calls in PostgreSQL and refuses those over the limit with `too-many-requests`. */
export function limitRate(
  orm: MikroORM,
  limit: RouteLimit<never>,
  { factor }: { factor: number },
): RequestHandler {
  return rateLimit({
    windowMs: limit.windowSeconds * 1000,
    limit: limit.hits * factor,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    identifier: limit.name,
    // The checks of the package print to the console; what they look for is settled by the configuration and by tests.
    validate: false,
    store: new PostgresStore(orm, limit.windowSeconds),
    keyGenerator: (request) => keyOf(request, limit),
    handler: (request, _response, next) => {
      const { rateLimit: info } = request as Request & { rateLimit?: { resetTime?: Date } };
      const seconds = info?.resetTime
        ? Math.ceil((info.resetTime.getTime() - Date.now()) / 1000)
        : limit.windowSeconds;
      next(problems.tooManyRequests(Math.max(1, seconds)));
    },
  });
}

/** Kept as a digest: nobody's address stands in the table, and a long one makes no long key. */
function keyOf(request: Request, { name, also }: RouteLimit<never>): string {
  const parts = [ipKeyGenerator(request.ip ?? 'unknown'), also?.(request.body as never) ?? ''];
  return `${name}:${createHash('sha256').update(JSON.stringify(parts)).digest('hex')}`;
}

interface WindowRow {
  hits: number;
  resets_at: string | Date;
}

/** A window per key: one atomic upsert counts a hit, or begins a new window when the old one has passed. */
class PostgresStore implements Store {
  readonly localKeys = false;
  readonly #orm: MikroORM;
  readonly #windowSeconds: number;

  constructor(orm: MikroORM, windowSeconds: number) {
    this.#orm = orm;
    this.#windowSeconds = windowSeconds;
  }

  async increment(key: string): Promise<ClientRateLimitInfo> {
    const rows = await this.#orm.em.getConnection().execute<WindowRow[]>(
      `insert into rate_limit_window as w (key, hits, resets_at)
       values (?, 1, now() + make_interval(secs => ?))
       on conflict (key) do update set
         hits = case when w.resets_at <= now() then 1 else w.hits + 1 end,
         resets_at = case when w.resets_at <= now() then excluded.resets_at else w.resets_at end
       returning hits, resets_at`,
      [key, this.#windowSeconds],
    );
    const row = rows[0];
    if (row === undefined) throw new Error('the rate limit window was not returned');
    return { totalHits: row.hits, resetTime: new Date(row.resets_at) };
  }

  async decrement(key: string): Promise<void> {
    await this.#orm.em
      .getConnection()
      .execute('update rate_limit_window set hits = greatest(hits - 1, 0) where key = ?', [key]);
  }

  async resetKey(key: string): Promise<void> {
    await this.#orm.em.getConnection().execute('delete from rate_limit_window where key = ?', [key]);
  }
}

/** Removes windows that have passed; called when somebody signs in. */
export async function deletePassedWindows(orm: MikroORM): Promise<void> {
  await orm.em.getConnection().execute('delete from rate_limit_window where resets_at < now()');
}
