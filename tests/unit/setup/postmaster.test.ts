import { writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { isLockMisleading, parsePostmasterFile, runningPostmaster } from '#server/setup/postmaster.mjs';

import { temporaryFolder } from './temporary-folder.ts';

/** Lines as the PostgreSQL 15 sources list them (miscadmin.h, LOCK_FILE_LINE_*). */
const lockFile = (pid: number, state = 'ready   ') =>
  [pid, '/data/postgres', 1796132000, 40123, '', '127.0.0.1', '  1234567     65537', state, ''].join('\n');

describe('postmaster.pid', () => {
  it('tells process, port and state', () => {
    expect(parsePostmasterFile(lockFile(4321))).toEqual({ pid: 4321, port: 40123, ready: true });
    expect(parsePostmasterFile(lockFile(4321, 'starting'))).toMatchObject({ ready: false });
  });

  it('tells nothing while it is being written', () => {
    expect(parsePostmasterFile('4321\n/data')).toBeUndefined();
    expect(parsePostmasterFile('')).toBeUndefined();
  });

  it('does not make a server of a living process that works elsewhere', () => {
    const folder = temporaryFolder();
    writeFileSync(join(folder, 'postmaster.pid'), lockFile(process.pid));
    expect(runningPostmaster(folder)).toBeUndefined();
    expect(isLockMisleading(folder)).toBe(true);
  });

  it('misleads nobody when it is not there', () => {
    expect(isLockMisleading(temporaryFolder())).toBe(false);
  });
});
