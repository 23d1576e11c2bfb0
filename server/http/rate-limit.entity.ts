import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

/** Hits of one caller in one window. In PostgreSQL, so that every server behind a balancer counts together. */
export const RateLimitWindow = defineEntity({
  name: 'RateLimitWindow',
  tableName: 'rate_limit_window',
  properties: {
    key: p.string().columnType('text').primary(),
    hits: p.integer(),
    resetsAt: p.datetime().index(),
  },
});
export type RateLimitWindow = InferEntity<typeof RateLimitWindow>;
