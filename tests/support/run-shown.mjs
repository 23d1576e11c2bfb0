import { spawn } from 'node:child_process';
import { delimiter, join } from 'node:path';

const GRACE_MS = 20_000;
const MINUTE_MS = 60_000;
/** @type {NodeJS.Signals[]} */
const STOP_SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP'];

/**
 * Runs a command of package.json as npm would, its output on the terminal and nothing on its input. When this process is
 * told to stop, or the time is up, the command ends with all that it started.
 *
 * @param {string} command
 * @param {{ cwd: string, limitMinutes?: number }} options
 * @returns {Promise<number>} its exit code
 */
export function runShown(command, { cwd, limitMinutes }) {
  return new Promise((resolve) => {
    const PATH = [join(cwd, 'node_modules', '.bin'), process.env['PATH']].join(delimiter);
    const env = { ...process.env, PATH };
    const child = spawn('/bin/sh', ['-c', command], {
      cwd,
      env,
      stdio: ['ignore', 'inherit', 'inherit'],
      detached: true,
    });
    const end = (/** @type {NodeJS.Signals} */ signal) => signalGroup(child.pid, signal);
    const limit =
      limitMinutes === undefined
        ? undefined
        : setTimeout(() => {
            console.log(`\nended after ${limitMinutes} minutes: ${command}`);
            end('SIGTERM');
            setTimeout(() => end('SIGKILL'), GRACE_MS).unref();
          }, limitMinutes * MINUTE_MS);
    const stop = (/** @type {NodeJS.Signals} */ signal) => {
      end(signal);
      process.exitCode = 1;
    };
    for (const signal of STOP_SIGNALS) process.on(signal, stop);
    const finish = (/** @type {number} */ code) => {
      clearTimeout(limit);
      for (const signal of STOP_SIGNALS) process.removeListener(signal, stop);
      resolve(code);
    };
    child.on('error', () => finish(127));
    child.on('close', (code) => finish(code ?? 1));
  });
}

/**
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} signal
 */
function signalGroup(pid, signal) {
  if (pid === undefined) return;
  try {
    process.kill(-pid, signal);
  } catch {
    // It has ended already.
  }
}
