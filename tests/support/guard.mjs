import { rmSync } from 'node:fs';

import { stopClusterIn } from '../../server/setup/cluster.mjs';

/**
 * Cleans up after a test run, however it ends. It runs as a process of its own and reads one order a line; when its input
 * ends, which also happens when the run is killed, it carries them out, the last one first, and ends.
 *
 * @typedef {{ kind: 'end', pid: number } | { kind: 'stop', cluster: string } | { kind: 'remove', folder: string }} Order
 */

const CHUNKS = [];
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => undefined);
for await (const chunk of process.stdin) CHUNKS.push(chunk);

const orders = Buffer.concat(CHUNKS)
  .toString()
  .split('\n')
  .filter((line) => line !== '')
  .map((line) => /** @type {Order} */ (JSON.parse(line)));

for (const order of orders.reverse()) {
  try {
    carryOut(order);
  } catch (error) {
    console.error(`clean-up after the tests: ${String(error)}`);
  }
}

/** @param {Order} order */
function carryOut(order) {
  switch (order.kind) {
    case 'end':
      endProcess(order.pid);
      break;
    case 'stop':
      stopClusterIn(order.cluster);
      break;
    case 'remove':
      rmSync(order.folder, { recursive: true, force: true });
      break;
  }
}

/** @param {number} pid */
function endProcess(pid) {
  try {
    process.kill(pid, 'SIGKILL');
  } catch {
    // It has ended already.
  }
}
