import type { TestProject } from 'vitest/node';

import './provided.ts';
import { startTestCluster } from './test-cluster.ts';

/** Starts a throw-away PostgreSQL for the API tests, and removes it after them. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await startTestCluster();
  project.provide('postgresAdminUrl', cluster.adminUrl);
  return () => cluster.guard.finish();
}
