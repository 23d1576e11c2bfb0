import {
  chownSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';

import { afterAll, describe, expect, it } from 'vitest';

import { createOrm } from '#server/db/orm.ts';
import { createCluster } from '#server/setup/cluster-create.mjs';
import { postgresAccount } from '#server/setup/cluster-folder.mjs';
import { isCluster, startCluster, stopClusterIn } from '#server/setup/cluster.mjs';
import { databaseFile } from '#server/setup/paths.mjs';
import { findPostgres } from '#server/setup/postgres-programs.mjs';
import { runningPostmaster } from '#server/setup/postmaster.mjs';
import {
  makePrivateDatabase,
  readDatabaseFile,
  startPrivateDatabase,
  stopPrivateDatabase,
} from '#server/setup/private-database.mjs';

const folders: string[] = [];

/** A data folder that the user who runs PostgreSQL can reach. */
function aDataFolder(): string {
  const folder = join(mkdtempSync(join(tmpdir(), 'oxymel-setup-')), 'data');
  mkdirSync(folder);
  for (const path of [dirname(folder), folder]) {
    const account = postgresAccount();
    if (account !== undefined) chownSync(path, account.uid, account.gid);
  }
  folders.push(folder);
  return folder;
}

/** As `npm start` does it: made when it is not there, then started. */
async function ensure(dataFolder: string): Promise<{ startedHere: boolean }> {
  const wanted = { dataFolder, env: process.env, say: () => undefined };
  await makePrivateDatabase(wanted);
  return startPrivateDatabase(wanted);
}

const urlIn = (dataFolder: string): string => readDatabaseFile(dataFolder).databaseUrl ?? '';

async function ask<Row>(databaseUrl: string, sql: string): Promise<Row[]> {
  const orm = await createOrm({ databaseUrl, poolMax: 1 });
  try {
    return await orm.em.getConnection().execute<Row[]>(sql);
  } finally {
    await orm.close(true);
  }
}

afterAll(() => {
  for (const folder of folders) {
    stopPrivateDatabase(folder);
    rmSync(dirname(folder), { recursive: true, force: true });
  }
});

describe('the private database', () => {
  it('keeps its rows when PostgreSQL is killed and started again', async () => {
    const dataFolder = aDataFolder();
    await ensure(dataFolder);
    await ask(urlIn(dataFolder), 'create table pour (name text)');
    await ask(urlIn(dataFolder), `insert into pour values ('daiquiri')`);

    const folder = join(dataFolder, 'postgres');
    process.kill(runningPostmaster(folder)?.pid ?? Number.NaN, 'SIGKILL');
    const { startedHere } = await ensure(dataFolder);

    expect(startedHere).toBe(true);
    expect(await ask(urlIn(dataFolder), 'select name from pour')).toEqual([{ name: 'daiquiri' }]);
  });

  it('is joined, not started a second time, when it runs already', async () => {
    const dataFolder = aDataFolder();
    await ensure(dataFolder);
    const first = urlIn(dataFolder);

    expect(await ensure(dataFolder)).toEqual({ startedHere: false });
    expect(urlIn(dataFolder)).toBe(first);
  });

  it('keeps its port over a stop and a start', async () => {
    const dataFolder = aDataFolder();
    await ensure(dataFolder);
    const first = urlIn(dataFolder);
    stopPrivateDatabase(dataFolder);
    expect(runningPostmaster(join(dataFolder, 'postgres'))).toBeUndefined();

    await ensure(dataFolder);

    expect(urlIn(dataFolder)).toBe(first);
  });

  it('starts although its old process id belongs to another program now', async () => {
    const dataFolder = aDataFolder();
    await ensure(dataFolder);
    const lock = join(dataFolder, 'postgres', 'postmaster.pid');
    const text = readFileSync(lock, 'utf8');
    stopPrivateDatabase(dataFolder);
    writeFileSync(lock, text.replace(/^\d+/, String(process.ppid)));

    expect(await ensure(dataFolder)).toEqual({ startedHere: true });
  });

  it('is the only one: two data folders get two servers', async () => {
    const [first, second] = [aDataFolder(), aDataFolder()];
    await Promise.all([ensure(first), ensure(second)]);

    expect(urlIn(first)).not.toBe(urlIn(second));
    await ask(urlIn(first), 'create table only_here (name text)');
    expect(await ask(urlIn(second), `select to_regclass('only_here') as found`)).toEqual([{ found: null }]);
  });

  it('connects as a role that is no superuser, with an address only its owner may read', async () => {
    const dataFolder = aDataFolder();
    await ensure(dataFolder);

    const rows = await ask(urlIn(dataFolder), 'select rolsuper from pg_roles where rolname = current_user');
    expect(rows).toEqual([{ rolsuper: false }]);
    expect(statSync(databaseFile(dataFolder)).mode & 0o777).toBe(0o600);
  });
});

describe('making a cluster', () => {
  const bin = findPostgres(process.env) ?? '';

  it('starts over when an earlier attempt was interrupted', async () => {
    const dataFolder = aDataFolder();
    const folder = join(dataFolder, 'postgres');
    mkdirSync(join(`${folder}.unfinished`, 'base'), { recursive: true });
    writeFileSync(join(`${folder}.unfinished`, 'PG_VERSION'), '15\n');

    expect(isCluster(folder)).toBe(false);
    await createCluster({ folder, bin, account: postgresAccount(), durable: false });

    expect(isCluster(folder)).toBe(true);
    expect(existsSync(`${folder}.unfinished`)).toBe(false);
    await startCluster({ folder });
    stopClusterIn(folder);
  });

  it('does not touch a folder with other files in it', async () => {
    const folder = join(aDataFolder(), 'postgres');
    mkdirSync(folder);
    writeFileSync(join(folder, 'letter.txt'), 'kept');

    await expect(createCluster({ folder, bin, account: postgresAccount() })).rejects.toThrow('is not empty');
    expect(readFileSync(join(folder, 'letter.txt'), 'utf8')).toBe('kept');
  });

  it('leaves nothing behind when it fails', async () => {
    const folder = join(aDataFolder(), 'postgres');

    await expect(createCluster({ folder, bin: '/nowhere', account: postgresAccount() })).rejects.toThrow(
      'Making the database (initdb) failed',
    );
    expect(existsSync(folder) || existsSync(`${folder}.unfinished`)).toBe(false);
  });
});
