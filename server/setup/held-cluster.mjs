import { claim, describeHolder } from './claims.mjs';
import { stopCluster } from './cluster.mjs';
import { dataFolderFrom, runningFile } from './paths.mjs';
import { SetupError } from './setup-error.mjs';

export const DEFAULT_HOST = '127.0.0.1';
export const DEFAULT_PORT = 3000;
const INTERRUPTED_EXIT_CODE = 130;
const SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP'];

const interrupt = () => process.exit(INTERRUPTED_EXIT_CODE);
let held = false;

/**
 * Claims the data folder for this process and makes sure that the private PostgreSQL ends with it, however it ends: a wrong
 * setting, a failed start, Ctrl-C while it starts, an error nobody caught. `npm start` calls it before anything else is
 * loaded, and the server again. Does nothing for a database of somebody else's.
 *
 * @param {NodeJS.ProcessEnv} env
 */
export function holdOwnCluster(env) {
  if (held || env['DATABASE_URL']) return;
  const dataFolder = dataFolderFrom(env);
  const claimed = claim(runningFile(dataFolder), {
    doing: 'npm start',
    address: `http://${env['HOST'] || DEFAULT_HOST}:${env['PORT'] || DEFAULT_PORT}`,
  });
  if (!claimed.ok) throw new SetupError(describeHolder(claimed.holder));
  held = true;
  process.once('exit', () => {
    stopCluster(dataFolder);
    claimed.release();
  });
  for (const signal of SIGNALS) process.on(signal, interrupt);
}

/** Called once the server answers signals itself: it then stops in order, and the database after it. */
export function leaveSignalsToServer() {
  for (const signal of SIGNALS) process.removeListener(signal, interrupt);
}
