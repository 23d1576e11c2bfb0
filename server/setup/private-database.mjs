import { mkdirSync, readFileSync } from 'node:fs';

import { canPass, chooseClusterFolder, postgresAccount } from './cluster-folder.mjs';
import { writePrivately } from './cluster-record.mjs';
import { createCluster } from './cluster-create.mjs';
import { isCluster, startCluster, stopClusterIn } from './cluster.mjs';
import { databaseFile } from './paths.mjs';
import { findPostgres } from './postgres-programs.mjs';
import { SetupError } from './setup-error.mjs';

/** @typedef {{ dataFolder: string, env: NodeJS.ProcessEnv, say: (text: string) => void }} Wanted */

/**
 * Makes the private database when there is none. It is not started: that is for the process that will also stop it.
 *
 * @param {Wanted} wanted
 */
export async function makePrivateDatabase({ dataFolder, env, say }) {
  mkdirSync(dataFolder, { recursive: true, mode: 0o755 });
  const account = postgresAccount();
  const folder = chooseClusterFolder({ dataFolder, canEnter: (path) => canPass(path, account) });
  if (isCluster(folder)) {
    say(`the one in ${folder}`);
  } else {
    say(`making an empty one in ${folder}`);
    const bin = findPostgres(env);
    if (bin === undefined) throw new SetupError('PostgreSQL is not installed.');
    await createCluster({ folder, bin, account });
  }
  writeDatabaseFile(dataFolder, { ...readDatabaseFile(dataFolder), clusterFolder: folder });
}

/**
 * Starts the private database, or joins it when it runs, and writes down its address for the server.
 *
 * @param {Wanted} wanted
 * @returns {Promise<{ startedHere: boolean }>}
 */
export async function startPrivateDatabase({ dataFolder, env, say }) {
  const { clusterFolder } = readDatabaseFile(dataFolder);
  if (clusterFolder === undefined || !isCluster(clusterFolder)) {
    throw new SetupError(
      'There is no database yet. Start with "npm start", which makes one, or set DATABASE_URL.',
    );
  }
  const { url, port, reused } = await startCluster({ folder: clusterFolder, env });
  writeDatabaseFile(dataFolder, { databaseUrl: url, clusterFolder });
  say(reused ? `runs already, on 127.0.0.1:${port}` : `started on 127.0.0.1:${port}`);
  return { startedHere: !reused };
}

/**
 * Stops the private database of a data folder, if it runs. Returns when it has ended.
 *
 * @param {string} dataFolder
 */
export function stopPrivateDatabase(dataFolder) {
  const { clusterFolder } = readDatabaseFile(dataFolder);
  if (clusterFolder !== undefined) stopClusterIn(clusterFolder);
}

/**
 * @param {string} dataFolder
 * @returns {{ databaseUrl?: string, clusterFolder?: string }}
 */
export function readDatabaseFile(dataFolder) {
  try {
    const { databaseUrl, clusterFolder } = JSON.parse(readFileSync(databaseFile(dataFolder), 'utf8'));
    return {
      ...(typeof databaseUrl === 'string' ? { databaseUrl } : {}),
      ...(typeof clusterFolder === 'string' ? { clusterFolder } : {}),
    };
  } catch (error) {
    const { code } = /** @type {NodeJS.ErrnoException} */ (error);
    if (code !== 'EACCES' && code !== 'EPERM') return {};
    throw new SetupError(
      `${databaseFile(dataFolder)} may not be read by this user. Start as the user who made it.`,
    );
  }
}

/**
 * @param {string} dataFolder
 * @param {{ databaseUrl?: string, clusterFolder: string }} content
 */
function writeDatabaseFile(dataFolder, content) {
  writePrivately(databaseFile(dataFolder), `${JSON.stringify(content)}\n`);
}
