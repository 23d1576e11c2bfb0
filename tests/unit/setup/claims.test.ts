import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { claim, describeHolder, holderOf } from '#server/setup/claims.mjs';

import { temporaryFolder } from './temporary-folder.ts';

const aFile = (): string => join(temporaryFolder(), 'data', 'running.json');
const claimant = { doing: 'npm start', address: 'http://127.0.0.1:3000' };

describe('a claim', () => {
  it('is refused while the process that has it lives, and says who that is', () => {
    const file = aFile();
    expect(claim(file, claimant).ok).toBe(true);
    expect(claim(file, { doing: 'npm run dev' })).toMatchObject({
      ok: false,
      holder: { pid: process.pid, address: 'http://127.0.0.1:3000' },
    });
  });

  it('is free again when it is released, and leaves no file', () => {
    const file = aFile();
    const first = claim(file, claimant);
    if (first.ok) first.release();
    expect(existsSync(file)).toBe(false);
    expect(claim(file, claimant).ok).toBe(true);
    expect(readdirSync(dirname(file))).toEqual(['running.json']);
  });

  it('is taken over from a process that has ended', () => {
    const file = aFile();
    claim(file, claimant);
    const { pid } = spawnSync('true');
    writeFileSync(file, JSON.stringify({ pid, startedAt: '1', doing: 'npm start' }));
    expect(holderOf(file)).toBeUndefined();
    expect(claim(file, claimant).ok).toBe(true);
  });

  it('is taken over when the process id belongs to a later process', () => {
    const file = aFile();
    claim(file, claimant);
    writeFileSync(file, JSON.stringify({ pid: process.pid, startedAt: '1', doing: 'npm start' }));
    expect(claim(file, claimant).ok).toBe(true);
    expect((JSON.parse(readFileSync(file, 'utf8')) as { startedAt: string }).startedAt).not.toBe('1');
  });

  it('is taken over when its file is damaged', () => {
    const file = aFile();
    claim(file, claimant);
    writeFileSync(file, '{"pid":');
    expect(claim(file, claimant).ok).toBe(true);
  });
});

describe('the message about a claim', () => {
  it('says where Oxymel answers and how to stop it', () => {
    const text = describeHolder({ pid: 42, startedAt: '1', ...claimant });
    expect(text).toContain('already running at http://127.0.0.1:3000');
    expect(text).toContain('kill 42');
  });

  it('says that it is being started while there is no address', () => {
    expect(describeHolder({ pid: 42, startedAt: '1', doing: 'npm start' })).toContain('is being started');
  });
});
