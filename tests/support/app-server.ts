import { type ChildProcess, spawn } from 'node:child_process';
import { setTimeout as wait } from 'node:timers/promises';

import { PROJECT_ROOT } from '#server/setup/paths.mjs';
import { freePort } from '#server/setup/ports.mjs';

import { type Guard, startGuard } from './guard.ts';

/** The real server as a process of its own. */
export interface AppServer {
  baseUrl: string;
  pid: number;
  /** What it has printed so far. */
  output: () => string;
  /** Sends a signal; resolves with the exit code. */
  stop: (signal?: NodeJS.Signals) => Promise<number | null>;
}

const START_MS = 120_000;
const POLL_MS = 100;

/** Starts `server/main.ts` with these settings on a free port and waits until it answers. */
export async function startAppServer(settings: Record<string, string>): Promise<AppServer> {
  const port = await freePort();
  const { child, output, ended } = spawnServer({ PORT: String(port), ...settings });
  const baseUrl = `http://127.0.0.1:${port}`;
  const stop = (signal: NodeJS.Signals = 'SIGTERM') => {
    child.kill(signal);
    return ended;
  };
  try {
    await untilHealthy({ baseUrl, child });
  } catch (error) {
    await stop('SIGKILL');
    throw new Error(`the server did not start:\n${output()}`, { cause: error });
  }
  return { baseUrl, pid: child.pid ?? 0, output, stop };
}

/** Runs `server/main.ts` to its end, for starts that have to fail. */
export async function runServerToItsEnd(
  settings: Record<string, string>,
): Promise<{ code: number | null; output: string }> {
  const { output, ended } = spawnServer(settings);
  const code = await ended;
  return { code, output: output() };
}

/** Ends servers that a test left running, for example because its time was up. */
let guard: Guard | undefined;

function spawnServer(settings: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: PROJECT_ROOT,
    env: { PATH: process.env['PATH'], HOME: process.env['HOME'], LOG_LEVEL: 'warn', ...settings },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let text = '';
  child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()));
  const { pid = 0 } = child;
  guard ??= startGuard();
  guard.order({ kind: 'end', pid });
  const ended = new Promise<number | null>((resolve) => {
    child.once('close', (code) => {
      guard?.order({ kind: 'forget', pid });
      resolve(code);
    });
  });
  return { child, output: () => text, ended };
}

async function untilHealthy({ baseUrl, child }: { baseUrl: string; child: ChildProcess }): Promise<void> {
  const deadline = Date.now() + START_MS;
  while (child.exitCode === null && Date.now() < deadline) {
    const response = await fetch(`${baseUrl}/api/health`).catch(() => undefined);
    if (response?.ok) return;
    await wait(POLL_MS);
  }
  throw new Error(child.exitCode === null ? 'no answer in time' : `exit code ${child.exitCode}`);
}
