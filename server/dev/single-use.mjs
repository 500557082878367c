import { connect, createServer } from 'node:net';
import { setTimeout as delay } from 'node:timers/promises';
import { checkout, hashOfPlace } from './checkout.mjs';
import { errorCode } from './setup-failure.mjs';

/**
 * What only one process at a time may do in a checkout. The claim is a listening socket in
 * Linux's abstract namespace: it has no file, and the kernel drops it however its holder ends, so
 * there is no stale lock to tidy up.
 */

/** @param {string} task */
function socketName(task) {
  return `\0flightcase-${hashOfPlace(checkout)}-${task}`;
}

/**
 * Claims a task, or says that somebody else holds it.
 *
 * @param {string} task
 * @returns {Promise<{ describe(text: string): void, release(): void } | null>} `describe` sets
 *   what others are told who ask with `askHolder`
 */
export async function claim(task) {
  let description = '';
  const server = createServer((socket) => {
    socket.on('error', () => socket.destroy());
    socket.end(description);
  });
  try {
    await new Promise((resolve, reject) => {
      server.on('error', reject);
      server.listen(socketName(task), () => resolve(undefined));
    });
  } catch (error) {
    if (errorCode(error) === 'EADDRINUSE') return null;
    throw error;
  }
  server.unref();
  return {
    describe: (text) => void (description = text),
    release: () => void server.close(),
  };
}

/**
 * What the holder of a task says about itself; an empty string where it says nothing or is gone.
 *
 * @param {string} task
 */
export async function askHolder(task) {
  return new Promise((/** @type {(said: string) => void} */ resolve) => {
    let said = '';
    const socket = connect(socketName(task));
    socket.setEncoding('utf8').setTimeout(1000, () => socket.destroy());
    socket.on('data', (text) => (said += String(text)));
    socket.on('error', () => resolve(''));
    socket.on('close', () => resolve(said));
  });
}

/**
 * Runs work while nobody else in this checkout does the same, waiting for others to finish.
 *
 * @template T
 * @param {string} task
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function oneAtATime(task, work) {
  for (;;) {
    const held = await claim(task);
    if (held) {
      try {
        return await work();
      } finally {
        held.release();
      }
    }
    await delay(100);
  }
}
