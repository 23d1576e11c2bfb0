import type { Server } from 'node:http';
import { createServer } from 'node:http';

import type { MikroORM } from '@mikro-orm/postgresql';
import type { Express } from 'express';

import type { Config } from './config.ts';
import { stopPrivateDatabase } from './setup/private-database.mjs';

/** Listens, or fails with the operating system's own error. */
export function listen(app: Express, config: Pick<Config, 'host' | 'port'>): Promise<Server> {
  const server = createServer(app);
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, config.host, () => {
      server.removeListener('error', reject);
      resolve(server);
    });
  });
}

/** On Ctrl-C or a stop: no new requests, open ones cut, database closed, and the private PostgreSQL stopped. */
export function stopOnSignals(running: { server: Server; orm: MikroORM; config: Config }): void {
  let stopping = false;
  const stop = (): void => {
    if (stopping) return;
    stopping = true;
    void stopAll(running).finally(() => process.exit(0));
  };
  process.on('SIGINT', stop);
  process.on('SIGTERM', stop);
  process.on('SIGHUP', stop);
}

async function stopAll({
  server,
  orm,
  config,
}: {
  server: Server;
  orm: MikroORM;
  config: Config;
}): Promise<void> {
  const closed = new Promise((resolve) => server.close(resolve));
  server.closeAllConnections();
  await closed;
  await orm.close(true);
  if (config.ownCluster) stopPrivateDatabase(config.dataFolder);
}
