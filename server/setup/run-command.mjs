import { spawn, spawnSync } from 'node:child_process';

/**
 * A system user to run as; undefined for the present one.
 *
 * @typedef {{ uid: number, gid: number } | undefined} Account
 */

/**
 * @typedef {object} RunOptions
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env]
 * @property {Account} [account]
 * @property {string} [input] given to the command on its standard input
 * @property {boolean} [show] whether what it prints, besides warnings and errors, is passed on
 * @property {RegExp} [failsOn] output that means failure even when the command then ends well
 */

/** @typedef {{ code: number, output: string }} RunResult */

const KEPT_OUTPUT_CHARACTERS = 64_000;

/** Commands that run now, so that a stop can end them first. @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();

/**
 * Runs a command to its end. Its output is kept (the last part), and shown while it runs when asked for.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<RunResult>}
 */
export function run(command, args, { cwd, env, account, input, show = false, failsOn } = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { cwd, env, ...account, stdio: ['pipe', 'pipe', 'pipe'] });
    running.add(child);
    let output = '';
    let failure = '';
    const keep = (/** @type {Buffer} */ chunk) => {
      output = (output + chunk.toString()).slice(-KEPT_OUTPUT_CHARACTERS);
      if (failure === '' && failsOn?.test(output)) failure = output;
    };
    child.stdout.on('data', keep);
    if (show) child.stdout.pipe(process.stdout, { end: false });
    child.stderr.on('data', keep);
    child.stdin.on('error', () => undefined);
    child.stdin.end(input ?? '');
    child.on('error', (error) => {
      running.delete(child);
      resolve({ code: 127, output: `${output}\n${error.message}` });
    });
    child.on('close', (code, signal) => {
      running.delete(child);
      const ending = signal === null ? '' : `\nended by ${signal}`;
      const failedQuietly = code === 0 && failure !== '';
      resolve({ code: failedQuietly ? 1 : (code ?? 1), output: failure + output + ending });
    });
  });
}

/**
 * Runs a short command to its end with all streams closed, which a command that leaves a server behind needs: the
 * server would inherit them, and waiting for them would never end.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {{ account?: Account, env?: NodeJS.ProcessEnv }} [options]
 * @returns {number} its exit code
 */
export function runQuietly(command, args, { account, env } = {}) {
  return spawnSync(command, args, { cwd: '/', env, ...account, stdio: 'ignore' }).status ?? 1;
}

/** Ends the commands that run now. */
export function endRunningCommands() {
  for (const child of running) child.kill('SIGTERM');
}
