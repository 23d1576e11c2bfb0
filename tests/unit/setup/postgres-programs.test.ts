import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { findPostgres, postgresFor } from '#server/setup/postgres-programs.mjs';

import { temporaryFolder } from './temporary-folder.ts';

describe("PostgreSQL's programs", () => {
  function installed(...majors: string[]): string {
    const folder = temporaryFolder();
    for (const major of majors) {
      mkdirSync(join(folder, major, 'bin'), { recursive: true });
      for (const name of ['initdb', 'pg_ctl', 'postgres'])
        writeFileSync(join(folder, major, 'bin', name), '');
    }
    return folder;
  }

  it('are those of the newest version by number', () => {
    const debianFolder = installed('9', '15', '17');
    expect(findPostgres({}, { debianFolder })).toBe(join(debianFolder, '17', 'bin'));
  });

  it('are those of the version that made the data', () => {
    const debianFolder = installed('15', '17');
    expect(findPostgres({}, { debianFolder, major: '15' })).toBe(join(debianFolder, '15', 'bin'));
  });

  it('are not there when only the client is', () => {
    const debianFolder = temporaryFolder();
    mkdirSync(join(debianFolder, '15', 'bin'), { recursive: true });
    writeFileSync(join(debianFolder, '15', 'bin', 'psql'), '');
    expect(findPostgres({}, { debianFolder })).toBeUndefined();
  });

  it('are those of OXYMEL_PG_BIN, and no others', () => {
    const bin = join(installed('15'), '15', 'bin');
    expect(findPostgres({ OXYMEL_PG_BIN: bin }, { debianFolder: '/nowhere' })).toBe(bin);
    expect(findPostgres({ OXYMEL_PG_BIN: '/nowhere' }, { debianFolder: installed('15') })).toBeUndefined();
  });

  it('are asked for by version when the data need another one', () => {
    expect(() => postgresFor({ OXYMEL_PG_BIN: '/nowhere' }, { major: '12', folder: '/data' })).toThrow(
      'postgresql-12',
    );
  });
});
