import type { TestProject } from 'vitest/node';

import { PROJECT_ROOT } from '#server/setup/paths.mjs';
import { ensureWebBuild } from '#server/setup/web-build.mjs';

import { startAppServer } from './app-server.ts';
import { createDatabaseIn } from './database-in.ts';
import './provided.ts';
import { startTestCluster } from './test-cluster.ts';

/** Builds the client and serves it with the demo team from a throw-away database. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  await ensureWebBuild(PROJECT_ROOT);
  const { adminUrl, guard } = await startTestCluster();
  try {
    const { databaseUrl } = await createDatabaseIn(adminUrl, { template: 'template0' });
    const server = await startAppServer({
      DATABASE_URL: databaseUrl,
      OXYMEL_DEMO: 'on',
      OXYMEL_RATE_LIMIT_FACTOR: '1000',
    });
    project.provide('postgresAdminUrl', adminUrl);
    project.provide('baseUrl', server.baseUrl);
    return async () => {
      await server.stop();
      await guard.finish();
    };
  } catch (error) {
    await guard.finish();
    throw error;
  }
}
