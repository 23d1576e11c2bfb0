import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';

import { claim } from './claims.mjs';

const TOPIC_WIDTH = 12;
const RETRY_MS = 500;

/**
 * Says what a step does or found, one line, in the form `topic   text`.
 *
 * @param {string} topic
 * @returns {(text: string) => void}
 */
export function sayAbout(topic) {
  return (text) => console.log(`${topic.padEnd(TOPIC_WIDTH)}${text}`);
}

/**
 * Does work on the checkout itself (its packages, its build) while no other process does; a second start waits.
 *
 * @template Result
 * @param {{ root: string, say: (text: string) => void, work: () => Promise<Result> }} job
 * @returns {Promise<Result>}
 */
export async function aloneInCheckout({ root, say, work }) {
  let told = false;
  for (;;) {
    const claimed = claim(join(root, '.data', 'preparing.json'), { doing: 'npm start' });
    if (claimed.ok) {
      try {
        return await work();
      } finally {
        claimed.release();
      }
    }
    if (!told) say(`waiting for process ${claimed.holder.pid}, which is at it in this checkout`);
    told = true;
    await wait(RETRY_MS);
  }
}
