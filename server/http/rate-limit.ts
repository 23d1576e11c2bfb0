import type { MikroORM } from '@mikro-orm/postgresql';
import { type RequestHandler, type Request } from 'express';
import { type ClientRateLimitInfo, type Store, ipKeyGenerator, rateLimit } from 'express-rate-limit';

import { problems } from './problems.ts';

export interface RateLimitRule {
  /** Keeps the counts of different rules apart. */
  name: string;
  hits: number;
  windowSeconds: number;
  /** Who is counted, besides the address. */
  keyOf?: (request: Request) => string;
}

/** Counts calls in PostgreSQL and refuses those over the limit with `too-many-requests`. */
export function limitRate(orm: MikroORM, rule: RateLimitRule): RequestHandler {
  return rateLimit({
    windowMs: rule.windowSeconds * 1000,
    limit: rule.hits,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    identifier: rule.name,
    store: new PostgresStore(orm, rule),
    keyGenerator: (request) =>
      [rule.name, ipKeyGenerator(request.ip ?? 'unknown'), rule.keyOf?.(request) ?? '']
        .join('|')
        .slice(0, 400),
    handler: (request, _response, next) => {
      const resetTime = (request as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
      const seconds = resetTime ? Math.ceil((resetTime.getTime() - Date.now()) / 1000) : rule.windowSeconds;
      next(problems.tooManyRequests(Math.max(1, seconds)));
    },
  });
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

  constructor(orm: MikroORM, rule: RateLimitRule) {
    this.#orm = orm;
    this.#windowSeconds = rule.windowSeconds;
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

/** Removes windows that have passed; called now and then by the server. */
export async function deletePassedWindows(orm: MikroORM): Promise<void> {
  await orm.em.getConnection().execute('delete from rate_limit_window where resets_at < now()');
}
