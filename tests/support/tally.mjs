/**
 * How much passed and failed, and what failed in words, as far as it is not a test of its own.
 *
 * @typedef {{ passed: number, failed: number, faults: string[] }} Tally
 */

/**
 * The part of Vitest's JSON report that is read here.
 *
 * @typedef {object} Report
 * @property {{ name: string, status: string, message?: string, assertionResults: { status: string, fullName: string }[] }[]} testResults
 */

/** Kinds whose tests lie in more folders than the one of their name. @type {Record<string, string[]>} */
const FOLDERS = { api: ['api', 'regression'] };

/**
 * Counts a run of Vitest. Nothing may be lost: a file that broke before its tests, a kind that ran no test, a test that was
 * skipped and an error outside any test count as failures.
 *
 * @param {{ projects: string[], exitCode: number, report: Report | undefined }} run
 * @returns {Tally}
 */
export function tallyOf({ projects, exitCode, report }) {
  if (report === undefined) {
    return { passed: 0, failed: 1, faults: [`${projects.join(', ')}: no report, exit code ${exitCode}`] };
  }
  const tests = report.testResults.flatMap((file) => file.assertionResults);
  const passed = tests.filter(({ status }) => status === 'passed').length;
  const failedTests = tests.filter(({ status }) => status === 'failed').length;
  const faults = [
    ...tests
      .filter(({ status }) => status !== 'passed' && status !== 'failed')
      .map(({ status, fullName }) => `${status}: ${fullName}`),
    ...brokenFiles(report),
    ...projects.filter((name) => !ranTests(report, name)).map((name) => `${name}: no test ran`),
  ];
  if (exitCode !== 0 && failedTests === 0 && faults.length === 0) {
    faults.push(`${projects.join(', ')}: an error outside the tests, exit code ${exitCode}`);
  }
  return { passed, failed: failedTests + faults.length, faults };
}

/**
 * Files that failed although none of their tests did, for example by an import that is missing.
 *
 * @param {Report} report
 */
function brokenFiles(report) {
  return report.testResults
    .filter(({ status, assertionResults }) => {
      return status === 'failed' && !assertionResults.some((test) => test.status === 'failed');
    })
    .map(({ name, message }) => `${name}: ${message?.split('\n')[0] || 'broke outside its tests'}`);
}

/**
 * @param {Report} report
 * @param {string} project
 */
function ranTests(report, project) {
  const folders = (FOLDERS[project] ?? [project]).map((folder) => `/tests/${folder}/`);
  return report.testResults.some(
    ({ name, assertionResults }) =>
      folders.some((folder) => name.includes(folder)) &&
      assertionResults.some(({ status }) => status === 'passed' || status === 'failed'),
  );
}
