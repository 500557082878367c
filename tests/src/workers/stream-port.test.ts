import { expect, it } from 'vitest';
import { sendThroughPort, streamFromPort } from '../../../src/workers/stream-port.ts';

/** Blocks that share one buffer, as a file's reader hands them out. */
async function* blocks(count: number, onMade: (made: number) => void = () => undefined) {
  const shared = new Uint8Array(4);
  for (let index = 0; index < count; index++) {
    await Promise.resolve();
    onMade(index + 1);
    yield shared.fill(index);
  }
}

it('carries every byte in order, though the blocks share their memory', async () => {
  const { port1, port2 } = new MessageChannel();
  let told = 0;
  const sent = sendThroughPort(blocks(40), port1, (bytes) => (told += bytes));
  const received: number[] = [];
  for await (const block of streamFromPort(port2)) received.push(...block);
  await sent;
  expect(told).toBe(160);
  expect(received).toEqual(Array.from({ length: 160 }, (_, at) => Math.floor(at / 4)));
});

it('makes no more blocks than the reader has room for', async () => {
  const { port1, port2 } = new MessageChannel();
  let made = 0;
  const sent = sendThroughPort(
    blocks(1000, (count) => (made = count)),
    port1,
    () => undefined,
  );
  const reader = streamFromPort(port2).getReader();
  await reader.read();
  await new Promise((resolve) => setTimeout(resolve, 50));
  expect(made).toBeLessThanOrEqual(8);
  await reader.cancel('enough');
  await expect(sent).rejects.toMatchObject({ name: 'ReaderStopped' });
});

it('tells the reader when the blocks end with an error', async () => {
  const { port1, port2 } = new MessageChannel();
  async function* broken(): AsyncGenerator<Uint8Array> {
    yield* blocks(1);
    throw new Error('the file changed');
  }
  const sent = sendThroughPort(broken(), port1, () => undefined);
  const read = (async () => {
    for await (const block of streamFromPort(port2)) expect(block).toHaveLength(4);
  })();
  await expect(sent).rejects.toThrow('the file changed');
  await expect(read).rejects.toThrow('the file changed');
});
