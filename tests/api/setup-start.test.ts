import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { afterAll, describe, expect, it, onTestFinished, vi } from 'vitest';

import { createOrm } from '#server/db/orm.ts';
import { runningPostmaster } from '#server/setup/postmaster.mjs';
import { makePrivateDatabase, stopPrivateDatabase } from '#server/setup/private-database.mjs';
import { runServerToItsEnd, startAppServer } from '#tests/support/app-server.ts';
import { createEmptyDatabase } from '#tests/support/database.ts';

/** Each test starts the real server once or twice, which takes its time on a busy machine. */
vi.setConfig({ testTimeout: 180_000 });

const UNUSED_PORT = '1';
const dataFolders: string[] = [];

async function aPrivateDatabase(): Promise<string> {
  const dataFolder = mkdtempSync(join(tmpdir(), 'oxymel-start-'));
  chmodSync(dataFolder, 0o755);
  dataFolders.push(dataFolder);
  await makePrivateDatabase({ dataFolder, env: process.env, say: () => undefined });
  return dataFolder;
}

const isDatabaseUp = (dataFolder: string): boolean =>
  runningPostmaster(join(dataFolder, 'postgres')) !== undefined;

/** A program that has taken a port. */
async function aTakenPort(): Promise<number> {
  const server: Server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  onTestFinished(() => void server.close());
  return (server.address() as AddressInfo).port;
}

async function ask<Row>(databaseUrl: string, sql: string): Promise<Row[]> {
  const orm = await createOrm({ databaseUrl, poolMax: 1 });
  try {
    return await orm.em.getConnection().execute<Row[]>(sql);
  } finally {
    await orm.close(true);
  }
}

const tablesIn = (databaseUrl: string) =>
  ask<{ name: string }>(
    databaseUrl,
    `select relname as name from pg_class where relkind = 'r'
    and relnamespace = 'public'::regnamespace order by relname`,
  );

function changed(databaseUrl: string, change: (url: URL) => void): string {
  const url = new URL(databaseUrl);
  change(url);
  return url.href;
}

afterAll(() => {
  for (const dataFolder of dataFolders) {
    stopPrivateDatabase(dataFolder);
    rmSync(dataFolder, { recursive: true, force: true });
  }
});

describe('a start that has to fail', () => {
  it.each<[string, (url: URL) => void, string]>([
    ['where no database answers', (url) => (url.port = UNUSED_PORT), 'does not answer'],
    ['with a wrong password', (url) => (url.password = 'wrong'), 'refuses the name or the password'],
    ['with a database that is not there', (url) => (url.pathname = '/not_there'), 'does not exist'],
    ['with encryption the database lacks', (url) => (url.search = 'sslmode=require'), 'encryption'],
  ])('%s ends with one message and exit code 1', async (_title, change, message) => {
    const { databaseUrl } = await createEmptyDatabase();
    const { code, output } = await runServerToItsEnd({ DATABASE_URL: changed(databaseUrl, change) });
    expect(output).toContain(`Oxymel did not start: `);
    expect(output).toContain(message);
    expect(output).not.toMatch(/^\s+at /m);
    expect(code).toBe(1);
  });

  it('on a taken port names another one', async () => {
    const { databaseUrl } = await createEmptyDatabase();
    const port = await aTakenPort();
    const { code, output } = await runServerToItsEnd({ DATABASE_URL: databaseUrl, PORT: String(port) });
    expect(output).toContain(`Another program uses 127.0.0.1:${port}`);
    expect(output).toContain(`PORT=${port + 1} npm start`);
    expect(code).toBe(1);
  });

  it('by its migration leaves the database as it was', async () => {
    const { databaseUrl } = await createEmptyDatabase();
    await ask(databaseUrl, 'create table spec (oddity text)');
    const before = await tablesIn(databaseUrl);

    const { code, output } = await runServerToItsEnd({ DATABASE_URL: databaseUrl });

    expect(output).toMatch(/Migration \S+ .*failed/);
    expect(output).toContain('The database was left as it was');
    expect(code).toBe(1);
    const after = await tablesIn(databaseUrl);
    expect(after.filter(({ name }) => name !== 'schema_migration')).toEqual(before);
  });

  it('by its settings stops the private database again', async () => {
    const dataFolder = await aPrivateDatabase();
    const { code, output } = await runServerToItsEnd({ OXYMEL_DATA_DIR: dataFolder, PORT: 'abc' });
    expect(output).toContain('PORT is "abc"');
    expect(code).toBe(1);
    expect(isDatabaseUp(dataFolder)).toBe(false);
  });
});

describe('the server on its private database', () => {
  it('stops it on Ctrl-C, with exit code 0', async () => {
    const dataFolder = await aPrivateDatabase();
    const server = await startAppServer({ OXYMEL_DATA_DIR: dataFolder });
    expect(isDatabaseUp(dataFolder)).toBe(true);
    expect(await server.stop('SIGINT')).toBe(0);
    expect(isDatabaseUp(dataFolder)).toBe(false);
  });

  it('goes on where it was after it was killed', async () => {
    const dataFolder = await aPrivateDatabase();
    const first = await startAppServer({ OXYMEL_DATA_DIR: dataFolder });
    await first.stop('SIGKILL');
    expect(isDatabaseUp(dataFolder)).toBe(true);

    const second = await startAppServer({ OXYMEL_DATA_DIR: dataFolder });

    expect(second.output()).toContain('runs already');
    expect(second.output()).not.toContain('brought up to date');
    expect(await second.stop('SIGTERM')).toBe(0);
    expect(isDatabaseUp(dataFolder)).toBe(false);
  });

  it('is not joined by a second server, which leaves the first alone', async () => {
    const dataFolder = await aPrivateDatabase();
    const first = await startAppServer({ OXYMEL_DATA_DIR: dataFolder });
    const { code, output } = await runServerToItsEnd({ OXYMEL_DATA_DIR: dataFolder });
    expect(output).toContain(`already running at ${first.baseUrl} (process ${first.pid})`);
    expect(code).toBe(1);
    expect((await fetch(`${first.baseUrl}/api/health`)).status).toBe(200);
    await first.stop();
  });
});
