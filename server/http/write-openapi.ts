import { writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { apiRoutes } from '../routes.ts';
import { PROJECT_ROOT } from '../setup/paths.mjs';
import { openApiText } from './openapi.ts';

/** Run by `npm run docs:openapi`. */
writeFileSync(join(PROJECT_ROOT, 'docs/openapi.json'), openApiText(apiRoutes()));
