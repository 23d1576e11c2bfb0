import type { SignIn } from '#shared/contracts/account.ts';

import type { RouteLimit } from '../../http/route.ts';
import { comparableEmail } from './account.queries.ts';

const MINUTES_15 = 900;
const HOUR = 3600;

/**
 * Limits where guessing pays. They count failed and successful calls alike. There is none on an e-mail address alone:
 * it would let a stranger lock a person out.
 */
export const SIGN_IN_LIMITS: RouteLimit<SignIn>[] = [
  { name: 'sign-in', hits: 30, windowSeconds: MINUTES_15 },
  {
    name: 'sign-in-address',
    hits: 10,
    windowSeconds: MINUTES_15,
    also: ({ email }) => comparableEmail(email),
  },
];

export const SIGN_UP_LIMITS: RouteLimit<unknown>[] = [{ name: 'sign-up', hits: 20, windowSeconds: HOUR }];

export const PASSWORD_LIMITS: RouteLimit<unknown>[] = [
  { name: 'password', hits: 20, windowSeconds: MINUTES_15 },
];

export const INVITATION_LIMITS: RouteLimit<unknown>[] = [
  { name: 'invitation', hits: 60, windowSeconds: MINUTES_15 },
];
