import { inject } from 'vitest';

import { createDatabaseIn, type TestDatabase } from './database-in.ts';
import './provided.ts';
import { TEMPLATE_DATABASE } from './test-cluster.ts';

export type { TestDatabase } from './database-in.ts';

/** Makes a database with the present schema and no rows, for one test file. */
export async function createTestDatabase(): Promise<TestDatabase> {
  return createDatabaseIn(inject('postgresAdminUrl'), { template: TEMPLATE_DATABASE });
}

/** Makes a database with nothing in it, for tests of the migrations and of the start. */
export async function createEmptyDatabase(): Promise<TestDatabase> {
  return createDatabaseIn(inject('postgresAdminUrl'), { template: 'template0' });
}
