import { createServer } from 'node:net';
import { afterEach, expect, test } from 'vitest';
import { firstFreePort, freePort, isPortFree } from '../../../server/dev/ports.mjs';

const listeners: ReturnType<typeof createServer>[] = [];

async function occupy(port: number, host: string): Promise<void> {
  const server = createServer();
  listeners.push(server);
  await new Promise<void>((resolve) => server.listen(port, host, resolve));
}

afterEach(() => {
  for (const server of listeners.splice(0)) server.close();
});

test('a port in use is not free, whichever address its user listens on', async () => {
  for (const host of ['127.0.0.1', '0.0.0.0']) {
    const port = await freePort();
    expect(await isPortFree(port)).toBe(true);
    await occupy(port, host);
    expect(await isPortFree(port)).toBe(false);
  }
});

test('the usual port is kept when free, else the next free one is taken', async () => {
  const usual = await freePort();
  expect(await firstFreePort(usual)).toBe(usual);
  await occupy(usual, '127.0.0.1');
  const next = await firstFreePort(usual);
  expect(next).toBeGreaterThan(usual);
  expect(await firstFreePort(usual, [next])).not.toBe(next);
});
