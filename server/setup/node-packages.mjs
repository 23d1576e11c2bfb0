import { readFileSync } from 'node:fs';
import { join } from 'node:path';

import { run } from './run-command.mjs';
import { describeFailure, SetupError } from './setup-error.mjs';
import { hashOf, isStamped, writeStamp } from './stamps.mjs';
import { aloneInCheckout, sayAbout } from './steps.mjs';

/**
 * Refuses a Node.js older than package.json asks for.
 *
 * @param {string} root
 * @param {string} [version]
 */
export function checkNodeVersion(root, version = process.versions.node) {
  const { engines } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
  const needed = String(engines.node).replace('>=', '');
  if (isAtLeast(version, needed)) return;
  throw new SetupError(
    `Node.js ${needed} or newer is needed, and this is ${version}. Install it (https://nodejs.org) and start again.`,
  );
}

/**
 * @param {string} version
 * @param {string} needed
 */
function isAtLeast(version, needed) {
  const have = version.split('.').map(Number);
  for (const [index, part] of needed.split('.').map(Number).entries()) {
    const own = have[index] ?? 0;
    if (own !== part) return own > part;
  }
  return true;
}

/**
 * Installs the packages of the lock file when they are missing or of another lock file. The stamp lies inside
 * node_modules and is written last: an interrupted installation is done again.
 *
 * @param {string} root
 */
export async function ensureNodePackages(root) {
  const say = sayAbout('packages');
  const stamp = join(root, 'node_modules', '.oxymel-stamp');
  const hash = hashOf(
    root,
    ['package-lock.json'],
    [process.versions.modules, process.platform, process.arch],
  );
  if (isStamped(stamp, hash)) {
    say('up to date');
    return;
  }
  await aloneInCheckout({
    root,
    say,
    work: async () => {
      if (isStamped(stamp, hash)) return;
      say('installing what package-lock.json lists (npm ci); about a minute the first time');
      const { code, output } = await run(...npmCommand(['ci', '--include=dev', '--no-audit', '--no-fund']), {
        cwd: root,
        show: true,
        // npm warns of files it could not unpack, and then ends as if all were well.
        failsOn: /TAR_ENTRY_ERROR/,
      });
      if (code !== 0)
        throw new SetupError(describeFailure({ doing: 'Installing packages (npm ci)', output }));
      writeStamp(stamp, hash);
    },
  });
}

/**
 * npm as it was called, or the one on the path.
 *
 * @param {string[]} args
 * @returns {[string, string[]]}
 */
function npmCommand(args) {
  const program = process.env['npm_execpath'];
  return program?.endsWith('npm-cli.js') ? [process.execPath, [program, ...args]] : ['npm', args];
}
