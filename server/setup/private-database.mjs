import { mkdirSync } from 'node:fs';

import { canPass, chooseClusterFolder, postgresAccount } from './cluster-folder.mjs';
import { writePrivately } from './cluster-record.mjs';
import { createCluster } from './cluster-create.mjs';
import { isCluster, startCluster } from './cluster.mjs';
import { databaseFile } from './paths.mjs';
import { findPostgres } from './postgres-programs.mjs';
import { SetupError } from './setup-error.mjs';

/**
 * Makes the private database when there is none, starts it when it does not run, and writes down its address for the
 * server. Returns whether it was started here.
 *
 * @param {{ dataFolder: string, env: NodeJS.ProcessEnv, say: (text: string) => void }} wanted
 * @returns {Promise<{ startedHere: boolean }>}
 */
export async function ensurePrivateDatabase({ dataFolder, env, say }) {
  mkdirSync(dataFolder, { recursive: true, mode: 0o755 });
  const account = postgresAccount();
  const folder = chooseClusterFolder({ dataFolder, canEnter: (path) => canPass(path, account) });
  if (!isCluster(folder)) {
    say(`making an empty database in ${folder}`);
    const bin = findPostgres(env);
    if (bin === undefined) throw new SetupError('PostgreSQL is not installed.');
    await createCluster({ folder, bin, account });
  }
  const { url, port, reused } = await startCluster({ folder, env });
  say(reused ? `runs already, on 127.0.0.1:${port}` : `started on 127.0.0.1:${port}`);
  writePrivately(
    databaseFile(dataFolder),
    `${JSON.stringify({ databaseUrl: url, clusterFolder: folder })}\n`,
  );
  return { startedHere: !reused };
}
