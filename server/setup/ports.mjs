import { createServer } from 'node:net';

const LOOPBACK = '127.0.0.1';

/**
 * Whether a program could listen on this loopback port now.
 *
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function isPortFree(port) {
  return listenOnce(port).then(
    () => true,
    () => false,
  );
}

/**
 * A loopback port that is free at this moment, chosen by the operating system.
 *
 * @returns {Promise<number>}
 */
export function freePort() {
  return listenOnce(0);
}

/**
 * The wished port if it is free, otherwise another one.
 *
 * @param {number | undefined} wished
 * @returns {Promise<number>}
 */
export async function portOrAnother(wished) {
  return wished !== undefined && (await isPortFree(wished)) ? wished : freePort();
}

/**
 * @param {number} port
 * @returns {Promise<number>}
 */
function listenOnce(port) {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(port, LOOPBACK, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' && address !== null ? address.port : port));
    });
  });
}
