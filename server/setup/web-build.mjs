import { existsSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';

import { run } from './run-command.mjs';
import { describeFailure, SetupError } from './setup-error.mjs';
import { hashOf, isStamped, removeStamp, writeStamp } from './stamps.mjs';
import { aloneInCheckout, sayAbout } from './steps.mjs';

/** All that the built client is made from. */
const WEB_SOURCES = ['src', 'shared', 'public', 'index.html', 'vite.config.ts', 'package-lock.json'];

/**
 * Builds the client when its sources have changed. The build is made beside the old one and takes its place at the
 * end, so a failed or interrupted build leaves what was there.
 *
 * @param {string} root
 */
export async function ensureWebBuild(root) {
  const say = sayAbout('web client');
  const stamp = join(root, 'dist', 'web.stamp');
  const built = join(root, 'dist', 'web');
  const isFresh = () => existsSync(join(built, 'index.html')) && isStamped(stamp, hashOf(root, WEB_SOURCES));
  if (isFresh()) {
    say('up to date');
    return;
  }
  await aloneInCheckout({
    root,
    say,
    work: async () => {
      if (isFresh()) return;
      say('building');
      const hash = hashOf(root, WEB_SOURCES);
      await buildInto(root, `${built}.new`);
      removeStamp(stamp);
      rmSync(`${built}.old`, { recursive: true, force: true });
      if (existsSync(built)) renameSync(built, `${built}.old`);
      renameSync(`${built}.new`, built);
      rmSync(`${built}.old`, { recursive: true, force: true });
      writeStamp(stamp, hash);
    },
  });
}

/**
 * @param {string} root
 * @param {string} folder
 */
async function buildInto(root, folder) {
  const vite = join(root, 'node_modules', 'vite', 'bin', 'vite.js');
  const { code, output } = await run(
    process.execPath,
    [vite, 'build', '--outDir', folder, '--emptyOutDir', '--logLevel', 'warn'],
    { cwd: root, env: { ...process.env, NODE_ENV: 'production' } },
  );
  if (code === 0) return;
  rmSync(folder, { recursive: true, force: true });
  throw new SetupError(describeFailure({ doing: 'Building the web client (vite build)', output }));
}
