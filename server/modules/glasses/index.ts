export { glassRoutes } from './glass.routes.ts';
