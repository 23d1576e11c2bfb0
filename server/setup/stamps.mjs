import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';

/**
 * One hash over the names and contents of files and of whole folders. A path that is not there counts as such.
 *
 * @param {string} root names are taken relative to this folder
 * @param {string[]} paths files and folders in it
 * @param {string[]} [extra] further texts that the result depends on
 */
export function hashOf(root, paths, extra = []) {
  const hash = createHash('sha256');
  for (const text of extra) hash.update(`text ${text}\0`);
  for (const file of paths.flatMap((path) => filesIn(join(root, path)))) {
    const content = readFileSync(file);
    hash.update(`file ${relative(root, file)} ${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

/**
 * @param {string} path
 * @returns {string[]}
 */
function filesIn(path) {
  const found = statSync(path, { throwIfNoEntry: false });
  if (found === undefined) return [];
  if (!found.isDirectory()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesIn(join(path, name)));
}

/**
 * Whether the work that this stamp stands for was done, to its end, from the same input.
 *
 * @param {string} file
 * @param {string} hash
 */
export function isStamped(file, hash) {
  try {
    return readFileSync(file, 'utf8').trim() === hash;
  } catch {
    return false;
  }
}

/**
 * @param {string} file
 * @param {string} hash
 */
export function writeStamp(file, hash) {
  writeFileSync(file, `${hash}\n`);
}

/** @param {string} file */
export function removeStamp(file) {
  rmSync(file, { force: true });
}
