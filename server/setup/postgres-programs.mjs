import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

import { SetupError } from './setup-error.mjs';

/** Where Debian puts the programs of each major version. */
const DEBIAN_FOLDER = '/usr/lib/postgresql';
const NEEDED_PROGRAMS = ['initdb', 'pg_ctl', 'postgres'];

/**
 * The folder of PostgreSQL's server programs: `OXYMEL_PG_BIN`, or Debian's newest version, or the one that made
 * an existing cluster.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {{ major?: string, debianFolder?: string }} [options]
 * @returns {string | undefined} undefined when it is not installed
 */
export function findPostgres(env, { major, debianFolder = DEBIAN_FOLDER } = {}) {
  const chosen = env['OXYMEL_PG_BIN'];
  if (chosen) return hasPrograms(chosen) ? chosen : undefined;
  return majorsIn(debianFolder)
    .filter((version) => major === undefined || version === major)
    .map((version) => join(debianFolder, version, 'bin'))
    .find(hasPrograms);
}

/**
 * The programs for a cluster that exists already.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {{ major: string, folder: string }} cluster
 * @returns {string}
 */
export function postgresFor(env, { major, folder }) {
  const bin = findPostgres(env, { major });
  if (bin !== undefined) return bin;
  throw new SetupError(
    `The database in ${folder} was made by PostgreSQL ${major}, which is not installed. ` +
      `Install it ("apt-get install postgresql-${major}"), or load a backup into a newer one: docs/running.md.`,
  );
}

/**
 * Version folders, newest first.
 *
 * @param {string} folder
 */
function majorsIn(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .filter((name) => /^\d+$/.test(name))
    .sort((first, second) => Number(second) - Number(first));
}

/** @param {string} bin */
function hasPrograms(bin) {
  return NEEDED_PROGRAMS.every((name) => statSync(join(bin, name), { throwIfNoEntry: false })?.isFile());
}
