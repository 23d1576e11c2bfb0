import type { AnyRoute } from '../../http/route.ts';
import { noteRoutes } from './note.routes.ts';
import { draftRoutes, specOnlyRoutes } from './spec.routes.ts';
import { versionRoutes } from './version.routes.ts';

export const specRoutes: AnyRoute[] = [...specOnlyRoutes, ...draftRoutes, ...versionRoutes, ...noteRoutes];
