import { randomBytes } from 'node:crypto';
import { chownSync, existsSync, mkdirSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { makeFoldersAbove } from './cluster-folder.mjs';
import { writeRecord } from './cluster-record.mjs';
import { run } from './run-command.mjs';
import { describeFailure, SetupError } from './setup-error.mjs';

/** @typedef {import('./run-command.mjs').Account} Account */
/** @typedef {{ folder: string, bin: string, account: Account, durable?: boolean }} NewCluster */

const PASSWORD_BYTES = 24;
const NAME = 'oxymel';

/**
 * Makes a cluster with an own role and database. All of it happens in a folder beside the final one, which is renamed
 * at the end: a cluster is there whole or not at all, and what an interrupted attempt left is removed by the next.
 *
 * @param {NewCluster} cluster
 */
export async function createCluster({ folder, bin, account, durable = true }) {
  refuseForeignFolder(folder);
  const unfinished = `${folder}.unfinished`;
  makeFoldersAbove(folder);
  rmSync(unfinished, { recursive: true, force: true });
  try {
    mkdirSync(unfinished, { mode: 0o700 });
    if (account !== undefined) chownSync(unfinished, account.uid, account.gid);
    await initialise({ folder: unfinished, bin, account, durable });
    await addRoleAndDatabase({ folder: unfinished, bin, account });
    rmSync(folder, { recursive: true, force: true });
    renameSync(unfinished, folder);
  } catch (error) {
    rmSync(unfinished, { recursive: true, force: true });
    throw error;
  }
}

/**
 * An empty folder may be replaced; one with other people's files may not.
 *
 * @param {string} folder
 */
function refuseForeignFolder(folder) {
  if (!existsSync(folder) || readdirSync(folder).length === 0) return;
  throw new SetupError(
    `${folder} is not empty and is not a PostgreSQL database. Move it away, or set OXYMEL_DATA_DIR to another folder.`,
  );
}

/** @param {Required<NewCluster>} cluster */
async function initialise({ folder, bin, account, durable }) {
  // The superuser's password is used by nobody: the program connects as its own role.
  const passwordFile = `${folder}.password`;
  writeFileSync(passwordFile, randomPassword(), { mode: 0o600 });
  if (account !== undefined) chownSync(passwordFile, account.uid, account.gid);
  try {
    const { code, output } = await run(
      join(bin, 'initdb'),
      [
        `--pgdata=${folder}`,
        '--username=postgres',
        `--pwfile=${passwordFile}`,
        '--auth=scram-sha-256',
        '--encoding=UTF8',
        '--locale=C.UTF-8',
        '--no-instructions',
        ...(durable ? [] : ['--no-sync']),
      ],
      { cwd: '/', account },
    );
    if (code !== 0) throw new SetupError(describeFailure({ doing: 'Making the database (initdb)', output }));
  } finally {
    rmSync(passwordFile, { force: true });
  }
}

/**
 * Adds the role and the database without a network, in PostgreSQL's single-user mode.
 *
 * @param {{ folder: string, bin: string, account: Account }} cluster
 */
async function addRoleAndDatabase({ folder, bin, account }) {
  const password = randomPassword();
  const { code, output } = await run(join(bin, 'postgres'), ['--single', '-D', folder, 'postgres'], {
    cwd: '/',
    account,
    input: `create role ${NAME} login createdb password '${password}'\ncreate database ${NAME} owner ${NAME}\n`,
  });
  if (code !== 0 || /\b(ERROR|FATAL|PANIC):/.test(output)) {
    throw new SetupError(describeFailure({ doing: 'Making the database', output }));
  }
  writeRecord(folder, { port: 0, role: NAME, password, database: NAME }, account);
}

function randomPassword() {
  return randomBytes(PASSWORD_BYTES).toString('base64url');
}
