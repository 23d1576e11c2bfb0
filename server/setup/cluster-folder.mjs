import { createHash } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';

import { runQuietly } from './run-command.mjs';
import { SetupError } from './setup-error.mjs';

/** @typedef {import('./run-command.mjs').Account} Account */

const SYSTEM_FOLDER = '/var/lib/oxymel';
/** Everyone may pass through, only the owner may change. */
const PASSABLE = 0o755;
const POSTGRES_USER = 'postgres';

/**
 * Where the private cluster lives: in the data folder, or, when the user that runs PostgreSQL cannot get there (a
 * project under root's home), in a system folder named after the project's path.
 *
 * @param {{ dataFolder: string, canEnter: (folder: string) => boolean, systemFolder?: string }} choice
 */
export function chooseClusterFolder({ dataFolder, canEnter, systemFolder = SYSTEM_FOLDER }) {
  const near = join(dataFolder, 'postgres');
  const far = join(
    systemFolder,
    createHash('sha256').update(dataFolder).digest('hex').slice(0, 16),
    'postgres',
  );
  if (existsSync(join(near, 'PG_VERSION'))) return near;
  if (existsSync(join(far, 'PG_VERSION'))) return far;
  return canEnter(dataFolder) ? near : far;
}

/**
 * Whether a user can pass through a folder, and so reach what is in it.
 *
 * @param {string} folder
 * @param {Account} account
 */
export function canPass(folder, account) {
  return account === undefined || runQuietly('/usr/bin/test', ['-x', folder], { account }) === 0;
}

/**
 * The user that runs PostgreSQL, which refuses to run as root: then Debian's `postgres`, otherwise whoever starts.
 *
 * @param {number} uid of this process
 * @returns {Account}
 */
export function postgresAccount(uid = process.getuid?.() ?? -1) {
  if (uid !== 0) return undefined;
  const entry = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .map((line) => line.split(':'))
    .find(([name]) => name === POSTGRES_USER);
  if (entry !== undefined) return { uid: Number(entry[2]), gid: Number(entry[3]) };
  throw new SetupError(
    'There is no user "postgres", and PostgreSQL must not run as root. Make one with ' +
      '"useradd --system postgres", or start Oxymel as an ordinary user.',
  );
}

/**
 * The user an existing cluster belongs to. Root may act as that user; anyone else has to be that user.
 *
 * @param {string} folder
 * @param {number} uid of this process
 * @returns {Account}
 */
export function ownerOf(folder, uid = process.getuid?.() ?? -1) {
  const { uid: ownerUid, gid } = statSync(folder);
  if (ownerUid === uid && uid !== 0) return undefined;
  if (uid === 0 && ownerUid !== 0) return { uid: ownerUid, gid };
  throw new SetupError(
    uid === 0
      ? `The database folder ${folder} belongs to root, and PostgreSQL must not run as root. ` +
          `Give it to its user: chown -R postgres: ${folder}`
      : `The database in ${folder} belongs to another user. Start as that user, ` +
          'or set OXYMEL_DATA_DIR to a folder of your own.',
  );
}

/**
 * Makes the folders above a cluster. Those that are made here can be passed through by its user, whatever the umask.
 *
 * @param {string} folder
 */
export function makeFoldersAbove(folder) {
  const parent = dirname(folder);
  const first = mkdirSync(parent, { recursive: true });
  if (first === undefined) return;
  for (let made = parent; made.length >= first.length; made = dirname(made)) chmodSync(made, PASSABLE);
}
