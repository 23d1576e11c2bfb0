import type { AnyRoute } from './http/route.ts';
import { healthRoutes } from './http/health.ts';
import { openApiRoutes } from './http/openapi.ts';
import { accountRoutes } from './modules/accounts/index.ts';
import { glassRoutes } from './modules/glasses/index.ts';
import { ingredientRoutes } from './modules/ingredients/index.ts';
import { specRoutes } from './modules/specs/index.ts';
import { teamRoutes } from './modules/teams/index.ts';

/** Every route of the API. The OpenAPI document and the access tests are made from this list. */
export function apiRoutes(): AnyRoute[] {
  const routes = [
    ...healthRoutes,
    ...accountRoutes,
    ...teamRoutes,
    ...ingredientRoutes,
    ...glassRoutes,
    ...specRoutes,
  ];
  return [...routes, ...openApiRoutes(routes)];
}
