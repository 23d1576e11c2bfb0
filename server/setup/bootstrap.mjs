import { claim, describeHolder } from './claims.mjs';
import { checkNodeVersion, ensureNodePackages } from './node-packages.mjs';
import { dataFolderFrom, PROJECT_ROOT, runningFile } from './paths.mjs';
import { makePrivateDatabase } from './private-database.mjs';
import { endRunningCommands } from './run-command.mjs';
import { explainSetupFailure, SetupError } from './setup-error.mjs';
import { sayAbout } from './steps.mjs';
import { ensurePostgres } from './system-packages.mjs';
import { ensureWebBuild } from './web-build.mjs';

/*
 * What `npm start` and `npm run dev` do before the server: only with what Node.js brings, because nothing else may be
 * installed yet. The database is made here and started by the process that also stops it.
 */

const INTERRUPTED_EXIT_CODE = 130;
const dataFolder = dataFolderFrom(process.env);

/** @param {string} mode `start`, or `dev`, which needs no built client */
async function prepare(mode) {
  checkNodeVersion(PROJECT_ROOT);
  const ownDatabase = !process.env['DATABASE_URL'];
  const claimed = ownDatabase
    ? claim(runningFile(dataFolder), { doing: mode === 'dev' ? 'npm run dev' : 'npm start' })
    : undefined;
  if (claimed?.ok === false) throw new SetupError(describeHolder(claimed.holder));
  process.once('exit', () => claimed?.release());

  if (ownDatabase) await ensurePostgres(process.env);
  await ensureNodePackages(PROJECT_ROOT);
  if (mode === 'start') await ensureWebBuild(PROJECT_ROOT);
  const say = sayAbout('database');
  if (!ownDatabase) {
    say('the one in DATABASE_URL');
    return;
  }
  await makePrivateDatabase({ dataFolder, env: process.env, say });
}

/** @param {number} code */
function giveUp(code) {
  endRunningCommands();
  process.exit(code);
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => giveUp(INTERRUPTED_EXIT_CODE));

prepare(process.argv[2] ?? 'start').catch((error) => {
  console.error(`\nOxymel did not start: ${explainSetupFailure(error)}`);
  giveUp(1);
});
