import type { RouteLimit } from '../../http/route.ts';

/** A team comes with some hundred rows of its own. */
export const TEAM_CREATION_LIMITS: RouteLimit<unknown>[] = [
  { name: 'team-creation', hits: 20, windowSeconds: 3600 },
];
