import { describe, expect, it } from 'vitest';

import { type Report, tallyOf } from '#tests/support/tally.mjs';

function aFile(name: string, statuses: string[], status = 'passed'): Report['testResults'][number] {
  return {
    name: `/srv/lab/tests/${name}`,
    status,
    message: '',
    assertionResults: statuses.map((each, index) => ({ status: each, fullName: `test ${index}` })),
  };
}

const run = (files: Report['testResults'], { projects = ['unit'], exitCode = 0 } = {}) =>
  tallyOf({ projects, exitCode, report: { testResults: files } });

describe('the tally of a test run', () => {
  it('counts tests that passed and failed', () => {
    const files = [aFile('unit/a.test.ts', ['passed', 'failed', 'passed'], 'failed')];
    expect(run(files, { exitCode: 1 })).toEqual({ passed: 2, failed: 1, faults: [] });
  });

  it('fails for a file that broke before its tests', () => {
    const files = [aFile('unit/a.test.ts', ['passed']), aFile('unit/b.test.ts', [], 'failed')];
    expect(run(files, { exitCode: 1 })).toMatchObject({ passed: 1, failed: 1 });
  });

  it('fails for a kind of test that ran none', () => {
    const files = [aFile('unit/a.test.ts', ['passed'])];
    expect(run(files, { projects: ['unit', 'browser'] })).toMatchObject({
      passed: 1,
      failed: 1,
      faults: ['browser: no test ran'],
    });
  });

  it('takes tests of fixed bugs for tests of the API', () => {
    const files = [aFile('regression/12.test.ts', ['passed'])];
    expect(run(files, { projects: ['api'] })).toEqual({ passed: 1, failed: 0, faults: [] });
  });

  it.each(['skipped', 'pending', 'todo'])('fails for a %s test', (status) => {
    expect(run([aFile('unit/a.test.ts', ['passed', status])])).toMatchObject({ passed: 1, failed: 1 });
  });

  it('fails for an error outside the tests', () => {
    expect(run([aFile('unit/a.test.ts', ['passed'])], { exitCode: 1 })).toMatchObject({
      passed: 1,
      failed: 1,
    });
  });

  it('fails when there is no report', () => {
    expect(tallyOf({ projects: ['unit'], exitCode: 1, report: undefined })).toMatchObject({ failed: 1 });
  });
});
