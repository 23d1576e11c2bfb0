export { glassRoutes } from './glass.routes.ts';
export { toGlassSnapshot } from './glass.mapper.ts';
export { findGlass } from './glass.queries.ts';
export { stockGlasses } from './glass.service.ts';
