import type { MigrationObject } from '@mikro-orm/core';

import { Migration20261201InitialSchema } from './20261201-initial-schema.ts';

/** Every migration in order, imported by name: the same under tsx, Vitest and compiled code. */
export const migrationsList: MigrationObject[] = [
  { name: '20261201-initial-schema', class: Migration20261201InitialSchema },
];
