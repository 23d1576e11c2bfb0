export { accountRoutes } from './account.routes.ts';
export { apiRateLimits } from './account.limits.ts';
export { createSessionManager } from './lucia.ts';
