import type { Config } from '../config.ts';
import { claim, describeHolder } from './claims.mjs';
import { stopCluster } from './cluster.mjs';
import { runningFile } from './paths.mjs';
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
 * a failed start, Ctrl-C while it starts, an error nobody caught. Does nothing for a database of somebody else's.
 */
export function holdOwnCluster(config: Config): HeldCluster {
  if (!config.ownCluster) return { serving: () => undefined };
  const claimed = claim(runningFile(config.dataFolder), {
    doing: 'npm start',
    address: `http://${config.host}:${config.port}`,
  });
  if (!claimed.ok) throw new SetupError(describeHolder(claimed.holder));
  process.once('exit', () => {
    stopCluster(config.dataFolder);
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
