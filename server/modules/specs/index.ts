export { specRoutes } from './spec.routes.ts';
