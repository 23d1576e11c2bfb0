export { findMembership } from './team.queries.ts';
export { recordEvent } from './history.service.ts';
export { teamRoutes } from './team.routes.ts';
