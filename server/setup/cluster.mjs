import { existsSync, readFileSync, renameSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';

import { ownerOf } from './cluster-folder.mjs';
import { readRecord, urlOf, writeRecord } from './cluster-record.mjs';
import { portOrAnother } from './ports.mjs';
import { postgresAnswers } from './postgres-answer.mjs';
import { postgresFor } from './postgres-programs.mjs';
import { isLockMisleading, runningPostmaster } from './postmaster.mjs';
import { runQuietly } from './run-command.mjs';
import { describeFailure, SetupError } from './setup-error.mjs';

/** @typedef {import('./run-command.mjs').Account} Account */
/** @typedef {{ folder: string, env?: NodeJS.ProcessEnv, settings?: string[] }} ClusterStart */
/** @typedef {{ url: string, port: number, reused: boolean }} StartedCluster */

/** After a crash PostgreSQL first replays its log, which may take a while. */
const START_SECONDS = 120;
const STOP_SECONDS = 60;
const ATTEMPTS = 10;
const RETRY_MS = 500;
const LOG_LIMIT_BYTES = 5_000_000;

/**
 * Whether a whole cluster is in the folder.
 *
 * @param {string} folder
 */
export function isCluster(folder) {
  return existsSync(join(folder, 'PG_VERSION'));
}

/**
 * Starts a cluster on loopback, or joins it when it runs already, for example because its last user was killed.
 *
 * @param {ClusterStart} start
 * @returns {Promise<StartedCluster>}
 */
export async function startCluster({ folder, env = process.env, settings = [] }) {
  const record = readRecord(folder);
  const already = await readyPostmaster(folder);
  if (already !== undefined) {
    return { url: urlOf({ ...record, port: already.port }), port: already.port, reused: true };
  }
  const account = ownerOf(folder);
  const bin = postgresFor(env, { major: majorOf(folder), folder });
  trimLog(folder);
  for (let attempt = 1; ; attempt += 1) {
    if (isLockMisleading(folder)) rmSync(join(folder, 'postmaster.pid'), { force: true });
    const port = await portOrAnother(attempt === 1 && record.port > 0 ? record.port : undefined);
    writeRecord(folder, { ...record, port }, account);
    const output = tryStart({ folder, bin, account, port, settings });
    if (output === undefined) return { url: urlOf({ ...record, port }), port, reused: false };
    if (attempt === ATTEMPTS || !isPassing(output)) {
      throw new SetupError(describeFailure({ doing: 'Starting the database', output }));
    }
    await wait(RETRY_MS);
  }
}

/**
 * Stops the cluster in a folder, if it runs. Returns when it has ended.
 *
 * @param {string} folder
 * @param {{ env?: NodeJS.ProcessEnv }} [options]
 */
export function stopClusterIn(folder, { env = process.env } = {}) {
  if (runningPostmaster(folder) === undefined) return;
  const account = ownerOf(folder);
  const control = join(postgresFor(env, { major: majorOf(folder), folder }), 'pg_ctl');
  const stop = (/** @type {string} */ mode) =>
    runQuietly(control, ['-D', folder, '-m', mode, '-w', '-t', String(STOP_SECONDS), 'stop'], { account });
  if (stop('fast') !== 0) stop('immediate');
}

/**
 * The server of a folder once it takes connections; undefined when none runs.
 *
 * @param {string} folder
 */
async function readyPostmaster(folder) {
  const deadline = Date.now() + START_SECONDS * 1000;
  for (;;) {
    const postmaster = runningPostmaster(folder);
    if (postmaster === undefined) return undefined;
    if (postmaster.ready && (await postgresAnswers(postmaster.port))) return postmaster;
    if (Date.now() > deadline) {
      throw new SetupError(
        `The database in ${folder} (process ${postmaster.pid}) is busy starting or stopping. ` +
          'Wait until it is done, then start again.',
      );
    }
    await wait(RETRY_MS);
  }
}

/**
 * Starts once. Returns undefined on success, otherwise what PostgreSQL wrote to its log.
 *
 * @param {{ folder: string, bin: string, account: Account, port: number, settings: string[] }} start
 * @returns {string | undefined}
 */
function tryStart({ folder, bin, account, port, settings }) {
  const log = join(folder, 'server.log');
  const before = statSync(log, { throwIfNoEntry: false })?.size ?? 0;
  // No socket: its path has a limit of 107 bytes, which a deep folder passes.
  const options = [
    'listen_addresses=127.0.0.1',
    `port=${port}`,
    "unix_socket_directories=''",
    ...settings,
  ].flatMap((setting) => ['-c', setting]);
  const code = runQuietly(
    join(bin, 'pg_ctl'),
    ['-D', folder, '-w', '-t', String(START_SECONDS), '-l', log, '-o', options.join(' '), 'start'],
    { account },
  );
  if (code === 0) return undefined;
  if (!existsSync(log)) return `${log} could not be written: No space left on device, or Permission denied`;
  return readFileSync(log).subarray(before).toString();
}

/**
 * Whether a failed start is worth another try: another program took the port, or the last processes of a killed server
 * are still ending.
 *
 * @param {string} output
 */
function isPassing(output) {
  return /could not bind|Address already in use|could not create any TCP|pre-existing shared memory|lock file .* already exists/.test(
    output,
  );
}

/** @param {string} folder */
function majorOf(folder) {
  return readFileSync(join(folder, 'PG_VERSION'), 'utf8').trim();
}

/** @param {string} folder */
function trimLog(folder) {
  const log = join(folder, 'server.log');
  if ((statSync(log, { throwIfNoEntry: false })?.size ?? 0) > LOG_LIMIT_BYTES) renameSync(log, `${log}.old`);
}
