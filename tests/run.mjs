import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { checkNodeVersion, ensureNodePackages } from '../server/setup/node-packages.mjs';
import { PROJECT_ROOT } from '../server/setup/paths.mjs';
import { SetupError } from '../server/setup/setup-error.mjs';
import { ensureChromium, ensurePostgres } from '../server/setup/system-packages.mjs';
import { runShown } from './support/run-shown.mjs';
import { tallyOf } from './support/tally.mjs';

/** @typedef {import('./support/tally.mjs').Tally} Tally */

/*
 * `npm test`: everything the pipeline runs, on a machine that may have nothing but Node.js. The last line says how much
 * passed and failed; lint and every type check count as one each.
 */

/** Together first; the browser afterwards and alone, because it needs the machine for itself. */
const VITEST_RUNS = [['unit', 'reference', 'property', 'component', 'api'], ['browser']];
const VITEST_LIMIT_MINUTES = 8;

/** @returns {Promise<Tally>} */
async function runEverything() {
  checkNodeVersion(PROJECT_ROOT);
  await ensurePostgres(process.env);
  await ensureChromium(process.env);
  await ensureNodePackages(PROJECT_ROOT);

  const { scripts } = JSON.parse(readFileSync(join(PROJECT_ROOT, 'package.json'), 'utf8'));
  /** @type {Tally[]} */
  const tallies = [await check('lint', scripts.lint)];
  for (const command of scripts.typecheck.split(' && ')) tallies.push(await check(command, command));
  for (const projects of VITEST_RUNS) tallies.push(await runVitest(projects));
  return {
    passed: tallies.reduce((sum, { passed }) => sum + passed, 0),
    failed: tallies.reduce((sum, { failed }) => sum + failed, 0),
    faults: tallies.flatMap(({ faults }) => faults),
  };
}

/**
 * A command that passes or fails as a whole.
 *
 * @param {string} title
 * @param {string} command a script of package.json
 * @returns {Promise<Tally>}
 */
async function check(title, command) {
  console.log(`\n— ${title}`);
  const code = await runShown(command, { cwd: PROJECT_ROOT });
  return code === 0
    ? { passed: 1, failed: 0, faults: [] }
    : { passed: 0, failed: 1, faults: [`${title}: exit code ${code}`] };
}

/**
 * @param {string[]} projects
 * @returns {Promise<Tally>}
 */
async function runVitest(projects) {
  console.log(`\n— ${projects.join(', ')}`);
  const folder = mkdtempSync(join(tmpdir(), 'oxymel-report-'));
  const report = join(folder, 'report.json');
  const flags = projects.map((name) => `--project ${name}`).join(' ');
  try {
    const exitCode = await runShown(
      `vitest run ${flags} --reporter=default --reporter=json --outputFile.json='${report}'`,
      { cwd: PROJECT_ROOT, limitMinutes: VITEST_LIMIT_MINUTES },
    );
    return tallyOf({ projects, exitCode, report: readReport(report) });
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** @param {string} file */
function readReport(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

try {
  const { passed, failed, faults } = await runEverything();
  for (const fault of faults) console.log(`failed: ${fault}`);
  process.exitCode = failed === 0 ? 0 : 1;
  console.log(`\n${passed} passed, ${failed} failed`);
} catch (error) {
  console.error(`\nThe tests did not run: ${error instanceof SetupError ? error.message : String(error)}`);
  process.exitCode = 1;
  console.log('\n0 passed, 1 failed');
}
