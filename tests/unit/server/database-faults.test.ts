import { describe, expect, it } from 'vitest';

import { isDatabaseUnreachable, isValueRefused } from '#server/http/database-faults.ts';

const coded = (code: string) => Object.assign(new Error('from the driver'), { code });

describe('a database that cannot be reached', () => {
  // Class 08 and the 57P and 53 codes: PostgreSQL 15, appendix A.
  it.each(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', '08006', '08001', '57P01', '57P03', '53300'])(
    'is known by %s',
    (code) => {
      expect(isDatabaseUnreachable(coded(code))).toBe(true);
    },
  );

  it('is known inside another error', () => {
    expect(isDatabaseUnreachable(new Error('query failed', { cause: coded('ECONNREFUSED') }))).toBe(true);
  });

  it('is known when every address was tried in vain', () => {
    const both = new AggregateError([coded('ECONNREFUSED'), coded('ECONNREFUSED')]);
    expect(isDatabaseUnreachable(both)).toBe(true);
  });

  it.each(['Connection terminated unexpectedly', 'Timeout acquiring a connection. The pool is full'])(
    'is known by the words %s',
    (message) => {
      expect(isDatabaseUnreachable(new Error(message))).toBe(true);
    },
  );

  it.each([['23505'], ['42P01'], ['22P02'], ['ENOENT']])('is not what %s means', (code) => {
    expect(isDatabaseUnreachable(coded(code))).toBe(false);
  });

  it('is not found in an error that is its own cause', () => {
    const error = new Error('round');
    error.cause = error;
    expect(isDatabaseUnreachable(error)).toBe(false);
  });
});

describe('a value that the database refuses', () => {
  it.each(['22021', '22P02', '22P05', '22003', '22008'])('is known by %s', (code) => {
    expect(isValueRefused(coded(code))).toBe(true);
  });

  it.each(['23505', '220', '2202', '42601'])('is not what %s means', (code) => {
    expect(isValueRefused(coded(code))).toBe(false);
  });
});
