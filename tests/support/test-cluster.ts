import { chmodSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { createOrm, migrate } from '#server/db/orm.ts';
import { createCluster } from '#server/setup/cluster-create.mjs';
import { canPass, postgresAccount } from '#server/setup/cluster-folder.mjs';
import { startCluster } from '#server/setup/cluster.mjs';
import { findPostgres } from '#server/setup/postgres-programs.mjs';

import { type Guard, startGuard } from './guard.ts';

/** A PostgreSQL of this test run alone: on a free port, in a temporary folder, gone afterwards. */
export interface TestCluster {
  /** A role that may create databases; the database in it is empty. */
  adminUrl: string;
  guard: Guard;
}

/** A database with the present schema and no rows, which every test database is copied from. */
export const TEMPLATE_DATABASE = 'oxymel_template';

/** Speed instead of safety: the data live as long as the run. */
const SETTINGS = [
  'fsync=off',
  'synchronous_commit=off',
  'full_page_writes=off',
  'max_connections=300',
  'autovacuum=off',
];

/** Starts the cluster and fills the template. The guard removes all of it, even when this process is killed. */
export async function startTestCluster(): Promise<TestCluster> {
  const guard = startGuard();
  try {
    const folder = join(temporaryFolder(guard), 'postgres');
    const bin = findPostgres(process.env);
    if (bin === undefined) {
      throw new Error(
        'PostgreSQL is not installed. Run "npm test", which installs it: apt-get install postgresql',
      );
    }
    await createCluster({ folder, bin, account: postgresAccount(), durable: false });
    guard.order({ kind: 'stop', cluster: folder });
    const { url } = await startCluster({ folder, settings: SETTINGS });
    await fillTemplate(url);
    return { adminUrl: url, guard };
  } catch (error) {
    await guard.finish();
    throw error;
  }
}

/** The address of another database in the same cluster. */
export function urlOfDatabase(adminUrl: string, name: string): string {
  const url = new URL(adminUrl);
  url.pathname = `/${name}`;
  return url.href;
}

function temporaryFolder(guard: Guard): string {
  for (const parent of [tmpdir(), '/tmp', '/var/tmp']) {
    if (!canPass(parent, postgresAccount())) continue;
    const folder = mkdtempSync(join(parent, 'oxymel-test-'));
    chmodSync(folder, 0o711);
    guard.order({ kind: 'remove', folder });
    return folder;
  }
  throw new Error('The user "postgres" cannot reach a temporary folder. Set TMPDIR to one it can reach.');
}

async function fillTemplate(adminUrl: string): Promise<void> {
  const admin = await createOrm({ databaseUrl: adminUrl, poolMax: 1 });
  await admin.em.getConnection().execute(`create database ${TEMPLATE_DATABASE}`);
  await admin.close(true);
  const template = await createOrm({ databaseUrl: urlOfDatabase(adminUrl, TEMPLATE_DATABASE), poolMax: 2 });
  await migrate(template);
  await template.close(true);
}
