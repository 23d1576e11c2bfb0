import { randomUUID } from 'node:crypto';

import { inject } from 'vitest';

import { createOrm } from '#server/db/orm.ts';

import './provided.ts';
import { TEMPLATE_DATABASE, urlOfDatabase } from './test-cluster.ts';

/** A database of one test file. */
export interface TestDatabase {
  databaseUrl: string;
  /** Removes it; connections that are still open are cut. */
  drop: () => Promise<void>;
}

/** Makes a database with the present schema and no rows. */
export async function createTestDatabase(): Promise<TestDatabase> {
  return createDatabaseIn(inject('postgresAdminUrl'), { template: TEMPLATE_DATABASE });
}

/** Makes a database with nothing in it, for tests of the migrations themselves. */
export async function createEmptyDatabase(): Promise<TestDatabase> {
  return createDatabaseIn(inject('postgresAdminUrl'), { template: 'template0' });
}

/** The same where Vitest's `inject` is not at hand, as in a global set-up. */
export async function createDatabaseIn(
  adminUrl: string,
  { template }: { template: string },
): Promise<TestDatabase> {
  const name = `t_${randomUUID().replaceAll('-', '')}`;
  await asAdmin(adminUrl, `create database ${name} template ${template}`);
  return {
    databaseUrl: urlOfDatabase(adminUrl, name),
    drop: () => asAdmin(adminUrl, `drop database if exists ${name} with (force)`),
  };
}

async function asAdmin(adminUrl: string, sql: string): Promise<void> {
  const orm = await createOrm({ databaseUrl: adminUrl, poolMax: 1 });
  try {
    await orm.em.getConnection().execute(sql);
  } finally {
    await orm.close(true);
  }
}
