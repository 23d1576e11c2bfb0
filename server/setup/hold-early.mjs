import { holdOwnCluster } from './held-cluster.mjs';

/* Loaded by `npm start` before the server's own modules, which take a second or two: Ctrl-C in that time stops the database too. */
try {
  holdOwnCluster(process.env);
} catch (error) {
  console.error(`\nOxymel did not start: ${error instanceof Error ? error.message : String(error)}`);
  process.exit(1);
}
