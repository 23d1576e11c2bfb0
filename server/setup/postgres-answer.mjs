import { connect } from 'node:net';

const ANSWER_MS = 5000;
/** PostgreSQL's "SSLRequest" message: its length and its code. Any server answers it with one letter. */
const SSL_REQUEST = Buffer.from([0, 0, 0, 8, 4, 210, 22, 47]);

/**
 * Whether a PostgreSQL on this loopback port really answers. A process that is being killed may still be listed, and
 * its port still be open, for a moment.
 *
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function postgresAnswers(port) {
  return new Promise((resolve) => {
    const socket = connect({ host: '127.0.0.1', port });
    const end = (/** @type {boolean} */ answered) => {
      socket.destroy();
      resolve(answered);
    };
    socket.setTimeout(ANSWER_MS, () => end(false));
    socket.on('connect', () => socket.write(SSL_REQUEST));
    socket.on('data', () => end(true));
    socket.on('error', () => end(false));
    socket.on('close', () => resolve(false));
  });
}
