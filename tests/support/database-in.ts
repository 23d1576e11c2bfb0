import { randomUUID } from 'node:crypto';

import { createOrm } from '#server/db/orm.ts';

import { urlOfDatabase } from './test-cluster.ts';

/** A database of one test file. */
export interface TestDatabase {
  databaseUrl: string;
  /** Removes it; connections that are still open are cut. */
  drop: () => Promise<void>;
}

/** Makes a database in a test cluster. Tests themselves use `createTestDatabase`. */
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
