import { pino } from 'pino';

import { createApp } from './app.ts';
import { loadConfig } from './config.ts';
import { createOrm, migrate } from './db/orm.ts';
import { DEMO_SIGN_INS, isEmpty, seedDemo } from './db/seed.ts';
import { createSessionManager } from './modules/accounts/index.ts';
import { listen, stopOnSignals } from './serving.ts';
import { holdPrivateDatabase, leaveSignalsToServer } from './setup/held-database.mjs';
import { explainStartFailure } from './setup/start-failures.ts';

/** Starts the server: settings, database, demo team, listening. Any failure is told in one message and ends it. */
async function main(): Promise<void> {
  await holdPrivateDatabase(process.env);
  const config = loadConfig(process.env);
  const logger = pino({
    level: config.logLevel,
    redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
  });
  const orm = await createOrm({ databaseUrl: config.databaseUrl });
  await orm.em.getConnection().execute('select 1');
  const migrations = await migrate(orm);
  if (migrations.length > 0) console.log(`Database brought up to date: ${migrations.join(', ')}.`);
  const seeded = config.seedDemo && (await isEmpty(orm));
  if (seeded) await seedDemo(orm);

  const sessions = createSessionManager(orm, { secureCookies: config.secureCookies });
  const app = createApp({ config, orm, logger, sessions, now: () => new Date() });
  const server = await listen(app, config);
  stopOnSignals({ server, orm, config });
  leaveSignalsToServer();

  console.log(`\nOxymel answers at http://${config.host}:${config.port}\n`);
  if (config.seedDemo) printSignIns();
}

function printSignIns(): void {
  console.log('Demo team: sign in as');
  for (const { email, password, roles } of DEMO_SIGN_INS) {
    console.log(`  ${email.padEnd(32)} ${password.padEnd(22)} ${roles.join(', ')}`);
  }
}

main().catch((error: unknown) => {
  console.error(`\nOxymel did not start: ${explainStartFailure(error)}`);
  process.exit(1);
});
