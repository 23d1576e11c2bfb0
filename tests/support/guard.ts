import { spawn } from 'node:child_process';
import { Socket } from 'node:net';
import { fileURLToPath } from 'node:url';

import type { Order } from './guard.mjs';

/** The process that cleans up after this one. */
export interface Guard {
  /** Adds something to do at the end. */
  order: (order: Order) => void;
  /** Has everything done now; resolves when it is. */
  finish: () => Promise<void>;
}

/** Starts a guard. It is detached, so that Ctrl-C in the terminal reaches the tests and not the guard. */
export function startGuard(): Guard {
  const script = fileURLToPath(new URL('./guard.mjs', import.meta.url));
  const child = spawn(process.execPath, [script], { detached: true, stdio: ['pipe', 'ignore', 'inherit'] });
  const ended = new Promise<void>((resolve) => child.once('close', () => resolve()));
  // Neither the process nor the pipe to it keeps this one alive.
  child.unref();
  if (child.stdin instanceof Socket) child.stdin.unref();
  return {
    order: (order) => void child.stdin.write(`${JSON.stringify(order)}\n`),
    finish: async () => {
      child.ref();
      child.stdin.end();
      await ended;
    },
  };
}
