import { holdPrivateDatabase } from './held-database.mjs';
import { explainSetupFailure } from './setup-error.mjs';

/* Loaded by `npm start` before the server's own modules, so that Ctrl-C stops the database from the first moment. */
try {
  await holdPrivateDatabase(process.env);
} catch (error) {
  console.error(`\nOxymel did not start: ${explainSetupFailure(error)}`);
  process.exit(1);
}
