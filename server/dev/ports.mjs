import { createServer } from 'node:net';
import { errorCode } from './setup-failure.mjs';

/** Everything the set-up starts listens here and nowhere else. */
export const loopback = '127.0.0.1';

/**
 * Listens for a moment to learn whether a port can be had.
 *
 * @param {number} port 0 lets the system choose
 * @returns {Promise<number | null>} the port, or null where it is taken or not allowed
 */
async function tryPort(port) {
  const server = createServer();
  try {
    await new Promise((resolve, reject) => {
      server.on('error', reject);
      server.listen(port, loopback, () => resolve(undefined));
    });
    const address = server.address();
    return address !== null && typeof address === 'object' ? address.port : null;
  } catch (error) {
    if (['EADDRINUSE', 'EACCES'].includes(errorCode(error))) return null;
    throw error;
  } finally {
    server.close();
  }
}

/** A port that nobody uses right now, chosen by the system. */
export async function freePort() {
  const port = await tryPort(0);
  if (port === null) throw new Error('The system has no free port on 127.0.0.1.');
  return port;
}

/** @param {number} port */
export async function isPortFree(port) {
  return (await tryPort(port)) !== null;
}

/**
 * The first free port from one on, so that an address stays the same from start to start unless
 * something else uses it.
 *
 * @param {number} from
 * @param {number[]} [except] ports already given away but not yet used
 */
export async function firstFreePort(from, except = []) {
  for (let port = from; port < from + 100; port += 1) {
    if (!except.includes(port) && (await isPortFree(port))) return port;
  }
  return freePort();
}
