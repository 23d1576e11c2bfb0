import { spawn } from 'node:child_process';
import { join } from 'node:path';

import { holdPrivateDatabase, leaveSignalsToServer } from './held-database.mjs';
import { dataFolderFrom, PROJECT_ROOT } from './paths.mjs';
import { freePort, portOrAnother } from './ports.mjs';
import { readDatabaseFile } from './private-database.mjs';
import { explainSetupFailure, SetupError } from './setup-error.mjs';
import { sayAbout } from './steps.mjs';

/*
 * `npm run dev`: the server, restarting when its code changes, and Vite with hot reload before it, on the database of
 * `npm start`. Ctrl-C, or the end of either, ends both and the private database.
 */

const WEB_PORT = 5173;
const HOST = '127.0.0.1';
const ownDatabase = !process.env['DATABASE_URL'];

/** @type {import('node:child_process').ChildProcess[]} */
const children = [];
let stopping = false;

async function main() {
  const apiPort = await freePort();
  const wished = Number(process.env['PORT']) || WEB_PORT;
  const webPort = await portOrAnother(wished);
  if (process.env['PORT'] && webPort !== wished)
    throw new SetupError(`Another program uses port ${wished} already.`);
  const address = `http://${HOST}:${webPort}`;
  await holdPrivateDatabase(process.env, { doing: 'npm run dev', address });
  leaveSignalsToServer();

  const env = { ...process.env, OXYMEL_API: `http://${HOST}:${apiPort}` };
  startNode(['tsx/dist/cli.mjs', 'watch', '--clear-screen=false', 'server/main.ts'], {
    ...env,
    DATABASE_URL: process.env['DATABASE_URL'] || readDatabaseFile(dataFolderFrom(process.env)).databaseUrl,
    OXYMEL_DEMO: process.env['OXYMEL_DEMO'] || (ownDatabase ? 'on' : 'off'),
    HOST,
    PORT: String(apiPort),
  });
  startNode(['vite/bin/vite.js', '--host', HOST, '--port', String(webPort), '--clearScreen', 'false'], env);
  sayAbout('dev')(`the client with hot reload: ${address} (its API at port ${apiPort})`);
}

/**
 * Starts a program of node_modules.
 *
 * @param {string[]} programAndArgs
 * @param {NodeJS.ProcessEnv} env
 */
function startNode([program = '', ...args], env) {
  const child = spawn(process.execPath, [join(PROJECT_ROOT, 'node_modules', program), ...args], {
    cwd: PROJECT_ROOT,
    env,
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  children.push(child);
  child.on('exit', () => void stop(stopping ? 0 : 1));
}

/**
 * Ends the children and waits for them; the database goes last.
 *
 * @param {number} code
 */
async function stop(code) {
  if (stopping) return;
  stopping = true;
  const living = children.filter((child) => child.exitCode === null && child.signalCode === null);
  await Promise.all(
    living.map((child) => {
      const ended = new Promise((resolve) => child.once('exit', resolve));
      child.kill('SIGTERM');
      return ended;
    }),
  );
  process.exit(code);
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void stop(0));

main().catch((error) => {
  console.error(`\nOxymel did not start: ${explainSetupFailure(error)}`);
  void stop(1);
});
