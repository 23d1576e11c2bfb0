import type { AnyRoute } from '../../http/route.ts';
import { accountRoutes as ownRoutes } from './account.routes.ts';
import { invitationRoutes } from './invitation.routes.ts';

export const accountRoutes: AnyRoute[] = [...ownRoutes, ...invitationRoutes];
export { createSessionManager, type SessionManager } from './lucia.ts';
export { hashPassword } from './password.ts';
