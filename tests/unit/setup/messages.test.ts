import { describe, expect, it } from 'vitest';

import { ConfigError } from '#server/config.ts';
import { checkNodeVersion } from '#server/setup/node-packages.mjs';
import { PROJECT_ROOT } from '#server/setup/paths.mjs';
import { adviceFor, describeFailure, SetupError } from '#server/setup/setup-error.mjs';
import { explainStartFailure } from '#server/setup/start-failures.ts';
import { describeMissing } from '#server/setup/system-packages.mjs';

/** An error as Node.js and its libraries make them: a message and further members. */
const anError = (message: string, members: Record<string, unknown> = {}): Error =>
  Object.assign(new Error(message), members);

describe('the advice for what a tool printed', () => {
  it.each([
    ['initdb: error: could not write to file "x": No space left on device', 'The disk is full'],
    ['npm error code ENOSPC', 'The disk is full'],
    ['mkdir: cannot create directory: Permission denied', 'This user may not write there'],
    ['npm error code EAI_AGAIN', 'The network did not answer'],
    [
      'E: Failed to fetch http://deb.example.test/x Temporary failure resolving',
      'The network did not answer',
    ],
    ['touch: Read-only file system', 'read-only'],
  ])('%s', (output, advice) => {
    expect(adviceFor(output)).toContain(advice);
    expect(describeFailure({ doing: 'This step', output })).toContain(`This step failed. `);
  });

  it('is the last lines of the tool when the cause is not known', () => {
    const output = Array.from({ length: 40 }, (_, index) => `line ${index}.`).join('\n');
    const text = describeFailure({ doing: 'The build', output });
    expect(text).toContain('line 39.');
    expect(text).not.toContain('line 20.');
  });
});

describe('the message of a start that failed', () => {
  const listening = { syscall: 'listen', address: '127.0.0.1', port: 3000 };

  it.each<[string, Error, string]>([
    ['a taken port', anError('x', { ...listening, code: 'EADDRINUSE' }), 'PORT=3001 npm start'],
    ['a low port', anError('x', { ...listening, port: 80, code: 'EACCES' }), 'below 1024'],
    ['a foreign address', anError('x', { ...listening, code: 'EADDRNOTAVAIL' }), 'HOST is not an address'],
    [
      'an unreachable database',
      anError('x', { code: 'ECONNREFUSED', syscall: 'connect' }),
      'does not answer',
    ],
    ['an unknown host', anError('x', { code: 'ENOTFOUND', syscall: 'getaddrinfo' }), 'is not known'],
    ['a wrong password', anError('x', { code: '28P01' }), 'the name or the password'],
    ['a missing database', anError('x', { code: '3D000' }), 'does not exist'],
    ['a full disk of the database', anError('x', { code: '53100' }), 'disk of the database is full'],
    ['a full disk here', anError('write', { code: 'ENOSPC' }), 'The disk is full'],
    ['a silent database', anError('timeout expired'), 'does not answer: the host'],
    ['a certificate', anError('self-signed certificate', { code: 'X' }), 'NODE_EXTRA_CA_CERTS'],
    ['encryption', anError('The server does not support SSL connections'), 'encryption'],
  ])('%s', (_title, error, expected) => {
    expect(explainStartFailure(error)).toContain(expected);
  });

  it('finds the cause inside the error of a library', () => {
    const cause = anError('password authentication failed', { code: '28P01' });
    expect(explainStartFailure(anError('driver', { previous: cause }))).toContain('the name or the password');
    const both = new AggregateError([anError('x', { code: 'ECONNREFUSED' })], 'all tries failed');
    expect(explainStartFailure(both)).toContain('does not answer');
  });

  it('names the migration that failed and says that nothing of it was kept', () => {
    const error = anError('Migration 20270102-menus (up) failed: Original error: relation "a" exists\nstack');
    expect(explainStartFailure(error)).toMatch(
      /^Migration 20270102-menus \(up\) failed: .*relation "a" exists\nThe database was left as it was/,
    );
  });

  it('repeats what settings and set-up said themselves', () => {
    expect(explainStartFailure(new ConfigError(['one', 'two']))).toBe('one\ntwo');
    expect(explainStartFailure(new SetupError('three'))).toBe('three');
  });

  it('shows an unknown error and where help is', () => {
    expect(explainStartFailure(anError('odd'))).toBe(
      'odd\nErrors and what to do are listed in docs/running.md.',
    );
    expect(explainStartFailure('odd')).toContain('odd');
  });
});

describe('what is missing on the machine', () => {
  it('is said with the exact command', () => {
    const text = describeMissing({
      name: 'postgresql',
      topic: 'PostgreSQL',
      otherwise: 'or set DATABASE_URL',
      isThere: () => false,
    });
    expect(text).toContain('apt-get update && apt-get install -y --no-install-recommends postgresql');
    expect(text).toContain('or set DATABASE_URL');
  });

  it.each(['18.20.4', '20.18.9'])('Node.js %s is refused', (version) => {
    expect(() => checkNodeVersion(PROJECT_ROOT, version)).toThrow(`this is ${version}`);
  });

  it.each(['20.19.0', '20.20.2', '22.0.0'])('Node.js %s is taken', (version) => {
    expect(() => checkNodeVersion(PROJECT_ROOT, version)).not.toThrow();
  });
});
