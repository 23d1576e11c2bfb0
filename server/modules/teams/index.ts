import type { AnyRoute } from '../../http/route.ts';
import { memberRoutes } from './member.routes.ts';
import { teamOnlyRoutes } from './team.routes.ts';

export const teamRoutes: AnyRoute[] = [...teamOnlyRoutes, ...memberRoutes];
export { recordEvent } from './history.service.ts';
export { findOpenInvitation } from './invitation.queries.ts';
export { acceptInvitation, joinByInvitation } from './invitation.service.ts';
export { toInvitationPreview } from './team.mapper.ts';
export { type TeamOfPerson, findMembership, findTeamsOf, loadTeam } from './team.queries.ts';
export { createTeam } from './team.service.ts';
