import { readFileSync, readdirSync, readlinkSync, realpathSync } from 'node:fs';
import { join } from 'node:path';

/**
 * What a running PostgreSQL says about itself in its folder.
 *
 * @typedef {object} Postmaster
 * @property {number} pid
 * @property {number} port
 * @property {boolean} ready whether it takes connections
 */

/**
 * Reads the lines of `postmaster.pid`: process id, folder, start, port, socket, address, shared memory, state.
 *
 * @param {string} text
 * @returns {Postmaster | undefined}
 */
export function parsePostmasterFile(text) {
  const lines = text.split('\n');
  const pid = Number(lines[0]);
  const port = Number(lines[3]);
  if (!Number.isInteger(pid) || pid <= 0 || !Number.isInteger(port) || port <= 0) return undefined;
  return { pid, port, ready: lines[7]?.trim() === 'ready' };
}

/**
 * The PostgreSQL that runs on a folder now. The file alone proves nothing: it stays behind when the process is killed,
 * and its process id may belong to another program by now.
 *
 * @param {string} folder
 * @returns {Postmaster | undefined}
 */
export function runningPostmaster(folder) {
  const postmaster = readPostmaster(folder);
  return postmaster !== undefined && worksIn(postmaster.pid, folder) ? postmaster : undefined;
}

/**
 * Whether the file names a living process that is not a PostgreSQL of this folder, which would make PostgreSQL refuse to
 * start, while no part of a killed server is left either.
 *
 * @param {string} folder
 */
export function isLockMisleading(folder) {
  const pid = Number(readText(join(folder, 'postmaster.pid'))?.split('\n')[0]);
  if (!Number.isInteger(pid) || pid <= 0 || readText(`/proc/${pid}/stat`) === undefined) return false;
  return processIds().every((other) => !worksIn(other, folder));
}

/** @param {string} folder */
function readPostmaster(folder) {
  const text = readText(join(folder, 'postmaster.pid'));
  return text === undefined ? undefined : parsePostmasterFile(text);
}

/**
 * Whether a process works in the folder: PostgreSQL's processes all do. Where the system hides that, the command line tells.
 *
 * @param {number} pid
 * @param {string} folder
 */
function worksIn(pid, folder) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === realpathSync(folder);
  } catch {
    return readText(`/proc/${pid}/cmdline`)?.split('\0').includes(folder) ?? false;
  }
}

/** @returns {number[]} */
function processIds() {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number);
}

/**
 * @param {string} file
 * @returns {string | undefined}
 */
function readText(file) {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return undefined;
  }
}
