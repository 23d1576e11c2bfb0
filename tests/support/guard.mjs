import { readFileSync, rmSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';

import { stopClusterIn } from '../../server/setup/cluster.mjs';

/**
 * Cleans up after a test run, however it ends. It runs as a process of its own and reads one order a line; when its input
 * ends, which also happens when the run is killed, it carries them out, the last one first, and ends.
 *
 * @typedef {{ kind: 'end', pid: number } | { kind: 'forget', pid: number } | { kind: 'stop', cluster: string } | { kind: 'remove', folder: string }} Order
 */

const PATIENCE_MS = 15_000;
const POLL_MS = 100;
const chunks = [];
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => undefined);
for await (const chunk of process.stdin) chunks.push(chunk);

const orders = Buffer.concat(chunks)
  .toString()
  .split('\n')
  .filter((line) => line !== '')
  .map((line) => /** @type {Order} */ (JSON.parse(line)));

const forgotten = new Set(orders.flatMap((order) => (order.kind === 'forget' ? [order.pid] : [])));

for (const order of orders.reverse()) {
  try {
    await carryOut(order);
  } catch (error) {
    console.error(`clean-up after the tests: ${String(error)}`);
  }
}

/** @param {Order} order */
async function carryOut(order) {
  switch (order.kind) {
    case 'end':
      if (!forgotten.has(order.pid)) await endProcess(order.pid);
      break;
    case 'forget':
      break;
    case 'stop':
      stopClusterIn(order.cluster);
      break;
    case 'remove':
      rmSync(order.folder, { recursive: true, force: true });
      break;
  }
}

/**
 * Asks a process to end, and makes it when it does not.
 *
 * @param {number} pid
 */
async function endProcess(pid) {
  const deadline = Date.now() + PATIENCE_MS;
  for (let asked = false; isLiving(pid); asked = true) {
    if (Date.now() > deadline) process.kill(pid, 'SIGKILL');
    else if (!asked) process.kill(pid, 'SIGTERM');
    await wait(POLL_MS);
  }
}

/** @param {number} pid */
function isLiving(pid) {
  try {
    return readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]?.[0] !== 'Z';
  } catch {
    return false;
  }
}
