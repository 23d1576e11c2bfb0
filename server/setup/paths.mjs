import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of this checkout. */
export const PROJECT_ROOT = resolve(dirname(fileURLToPath(import.meta.url)), '..', '..');

/**
 * Where everything that has to last is kept: `OXYMEL_DATA_DIR`, or `.data` in the project.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {string} [root]
 */
export function dataFolderFrom(env, root = PROJECT_ROOT) {
  return resolve(root, env['OXYMEL_DATA_DIR'] || '.data');
}

/**
 * Holds the address of the private database; written by `npm start`, readable by its owner only.
 *
 * @param {string} dataFolder
 */
export function databaseFile(dataFolder) {
  return join(dataFolder, 'database.json');
}

/**
 * Says which process runs on this data folder, and where it answers.
 *
 * @param {string} dataFolder
 */
export function runningFile(dataFolder) {
  return join(dataFolder, 'running.json');
}
