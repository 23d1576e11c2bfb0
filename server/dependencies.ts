import type { MikroORM } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';

import type { Config } from './config.ts';
import type { SessionManager } from './modules/accounts/lucia.ts';

/** Everything the application is built from. Handed in, never imported. */
export interface Dependencies {
  config: Config;
  orm: MikroORM;
  logger: Logger;
  sessions: SessionManager;
  /** The present time; tests hand in a clock of their own. */
  now: () => Date;
}
