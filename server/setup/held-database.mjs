import { claim, describeHolder } from './claims.mjs';
import { dataFolderFrom, runningFile } from './paths.mjs';
import { startPrivateDatabase, stopPrivateDatabase } from './private-database.mjs';
import { SetupError } from './setup-error.mjs';
import { sayAbout } from './steps.mjs';

export const DEFAULT_HOST = '127.0.0.1';
export const DEFAULT_PORT = 3000;
const INTERRUPTED_EXIT_CODE = 130;
const SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP'];

const interrupt = () => process.exit(INTERRUPTED_EXIT_CODE);
let held = false;

/**
 * Claims the data folder for this process, starts the private PostgreSQL, and makes sure that it ends with this process,
 * however that ends: a wrong setting, a failed start, Ctrl-C while it starts, an error nobody caught. `npm start`
 * calls it before anything else is loaded, and the server again. Does nothing for a database of somebody else's.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {{ doing?: string, address?: string }} [holder]
 */
export async function holdPrivateDatabase(env, { doing = 'npm start', address = addressFrom(env) } = {}) {
  if (held || env['DATABASE_URL']) return;
  held = true;
  const dataFolder = dataFolderFrom(env);
  const claimed = claim(runningFile(dataFolder), { doing, address });
  if (!claimed.ok) throw new SetupError(describeHolder(claimed.holder));
  process.once('exit', () => {
    stopPrivateDatabase(dataFolder);
    claimed.release();
  });
  for (const signal of SIGNALS) process.on(signal, interrupt);
  await startPrivateDatabase({ dataFolder, env, say: sayAbout('database') });
}

/** Called once the process answers signals itself: it then stops in order, and the database after it. */
export function leaveSignalsToServer() {
  for (const signal of SIGNALS) process.removeListener(signal, interrupt);
}

/** @param {NodeJS.ProcessEnv} env */
function addressFrom(env) {
  return `http://${env['HOST'] || DEFAULT_HOST}:${env['PORT'] || DEFAULT_PORT}`;
}
