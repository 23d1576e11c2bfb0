import { DEFAULT_HOST, DEFAULT_PORT } from '../config.ts';
import { claim, describeHolder } from './claims.mjs';
import { stopCluster } from './cluster.mjs';
import { dataFolderFrom, runningFile } from './paths.mjs';
import { SetupError } from './setup-error.mjs';

/** What is held while the server runs on the private database. */
export interface HeldCluster {
  /** Called once the server stops by its own signal handlers, which then answer Ctrl-C. */
  serving: () => void;
}

const INTERRUPTED_EXIT_CODE = 130;
const SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/**
 * Claims the data folder for this process and makes sure that the private PostgreSQL ends with it, however it ends:
 * a wrong setting, a failed start, Ctrl-C while it starts, an error nobody caught. Comes before the settings are checked
 * for that reason. Does nothing for a database of somebody else's.
 */
export function holdOwnCluster(env: NodeJS.ProcessEnv): HeldCluster {
  if (env['DATABASE_URL']) return { serving: () => undefined };
  const dataFolder = dataFolderFrom(env);
  const claimed = claim(runningFile(dataFolder), {
    doing: 'npm start',
    address: `http://${env['HOST'] || DEFAULT_HOST}:${env['PORT'] || DEFAULT_PORT}`,
  });
  if (!claimed.ok) throw new SetupError(describeHolder(claimed.holder));
  process.once('exit', () => {
    stopCluster(dataFolder);
    claimed.release();
  });
  const interrupt = (): void => process.exit(INTERRUPTED_EXIT_CODE);
  for (const signal of SIGNALS) process.on(signal, interrupt);
  return {
    serving: () => {
      for (const signal of SIGNALS) process.removeListener(signal, interrupt);
    },
  };
}
