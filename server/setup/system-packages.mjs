import { existsSync, mkdirSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';

import { findPostgres } from './postgres-programs.mjs';
import { run, runQuietly } from './run-command.mjs';
import { describeFailure, SetupError } from './setup-error.mjs';
import { sayAbout } from './steps.mjs';

/**
 * A package of Debian that may be missing.
 *
 * @typedef {object} SystemPackage
 * @property {string} name as Debian calls it
 * @property {string} topic for messages
 * @property {string} otherwise what to do instead of installing it
 * @property {() => boolean} isThere
 */

/** With this, Debian's package does not make and start a cluster of its own on port 5432. */
const CREATE_CLUSTER_SETTINGS = '/etc/postgresql-common/createcluster.conf';
const LOCK_RETRIES = 60;
const LOCK_RETRY_MS = 5000;

/**
 * Debian's Chromium, or the one a setting names.
 *
 * @param {NodeJS.ProcessEnv} env
 */
export function chromiumPath(env) {
  return env['OXYMEL_CHROMIUM'] || '/usr/bin/chromium';
}

/** @param {NodeJS.ProcessEnv} env */
export async function ensurePostgres(env) {
  await ensureSystemPackage({
    name: 'postgresql',
    topic: 'PostgreSQL',
    otherwise: 'or set DATABASE_URL to the address of a database that you have',
    isThere: () => findPostgres(env) !== undefined,
  });
}

/** @param {NodeJS.ProcessEnv} env */
export async function ensureChromium(env) {
  await ensureSystemPackage({
    name: 'chromium',
    topic: 'Chromium',
    otherwise: 'or set OXYMEL_CHROMIUM to the path of one that you have',
    isThere: () => existsSync(chromiumPath(env)),
  });
}

/** @param {SystemPackage} wanted */
async function ensureSystemPackage(wanted) {
  if (wanted.isThere()) return;
  const say = sayAbout(wanted.topic);
  const installer = rightToInstall();
  if (installer === undefined) throw new SetupError(describeMissing(wanted));
  say(`installing Debian's package ${wanted.name} (apt-get)`);
  if (wanted.name === 'postgresql' && installer.length === 0) keepDebianFromMakingCluster();
  await apt({ installer, args: ['update', '-qq'], isDone: wanted.isThere });
  await apt({
    installer,
    args: ['install', '-y', '-qq', '--no-install-recommends', wanted.name],
    isDone: wanted.isThere,
  });
  if (!wanted.isThere()) throw new SetupError(describeMissing(wanted));
}

/**
 * What to put before a command so that it may install packages; undefined when this user may not.
 *
 * @returns {string[] | undefined}
 */
function rightToInstall() {
  if (!existsSync('/usr/bin/apt-get')) return undefined;
  if (process.getuid?.() === 0) return [];
  return runQuietly('sudo', ['-n', 'true']) === 0 ? ['sudo', '-n'] : undefined;
}

/**
 * The exact command to run, for someone who may not install packages from here.
 *
 * @param {SystemPackage} wanted
 */
export function describeMissing({ name, topic, otherwise }) {
  const command = `apt-get update && apt-get install -y --no-install-recommends ${name}`;
  const asRoot = existsSync('/usr/bin/sudo') ? `sudo sh -c '${command}'` : `su -c '${command}'`;
  return `${topic} is not installed. Run this, then start again:\n\n    ${asRoot}\n\n${otherwise}.`;
}

function keepDebianFromMakingCluster() {
  if (existsSync(CREATE_CLUSTER_SETTINGS)) return;
  mkdirSync(dirname(CREATE_CLUSTER_SETTINGS), { recursive: true });
  writeFileSync(CREATE_CLUSTER_SETTINGS, 'create_main_cluster = false\n');
}

/**
 * Runs apt-get. Another installation on the same machine (a second checkout, automatic upgrades) is waited for.
 *
 * @param {{ installer: string[], args: string[], isDone: () => boolean }} call
 */
async function apt({ installer, args, isDone }) {
  const command = [
    ...installer,
    'env',
    'DEBIAN_FRONTEND=noninteractive',
    'apt-get',
    '-o',
    'Dpkg::Options::=--force-confold',
    ...args,
  ];
  for (let attempt = 1; !isDone(); attempt += 1) {
    const { code, output } = await run(command[0] ?? '', command.slice(1), { cwd: '/' });
    if (code === 0) return;
    if (attempt === LOCK_RETRIES || !/Could not get lock|Unable to (acquire|lock)/.test(output)) {
      throw new SetupError(describeFailure({ doing: `apt-get ${args[0] ?? ''}`, output }));
    }
    await wait(LOCK_RETRY_MS);
  }
}
