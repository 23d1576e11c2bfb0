import type { RequestHandler } from 'express';

import type { Dependencies } from '../../dependencies.ts';
import { limitRate } from '../../http/rate-limit.ts';

/** Limits on the routes where guessing pays. They stand before the routes and count failed and successful calls. */
export function apiRateLimits({ orm, config }: Dependencies): { path: string; handlers: RequestHandler[] }[] {
  const factor = config.rateLimitFactor;
  return [
    {
      path: '/api/auth/sign-in',
      handlers: [limitRate(orm, { name: 'sign-in', hits: 30 * factor, windowSeconds: 900 })],
    },
    {
      path: '/api/auth/sign-up',
      handlers: [limitRate(orm, { name: 'sign-up', hits: 20 * factor, windowSeconds: 3600 })],
    },
    {
      path: '/api/auth/password',
      handlers: [limitRate(orm, { name: 'password', hits: 20 * factor, windowSeconds: 900 })],
    },
    {
      path: '/api/invitations',
      handlers: [limitRate(orm, { name: 'invitations', hits: 60 * factor, windowSeconds: 900 })],
    },
  ];
}
