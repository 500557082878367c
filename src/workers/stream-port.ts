/**
 * Carries a stream of byte blocks over a MessagePort, one block for each pull, so that a slow disk
 * slows the producer down and nothing piles up. Blocks are moved, not copied.
 */
type FromReader = { pull: true } | { cancel: string };
type FromWriter = { block: Uint8Array<ArrayBuffer> } | { end: true } | { failed: string };

/**
 * Sends every block through the port and resolves at the end. Rejects with the reader's reason
 * when the reader stops, and tells the reader when the producer fails.
 */
export async function sendThroughPort(
  blocks: AsyncIterable<Uint8Array>,
  port: MessagePort,
  onSent: (bytes: number) => void,
): Promise<void> {
  let pulls = 0;
  let stopped: string | null = null;
  let wake = (): void => undefined;
  port.addEventListener('message', (event: MessageEvent<FromReader>) => {
    if ('pull' in event.data) pulls += 1;
    else stopped = event.data.cancel;
    wake();
  });
  port.start();
  const post = (message: FromWriter, transfer: Transferable[] = []): void =>
    port.postMessage(message, transfer);
  try {
    for await (const block of blocks) {
      while (pulls === 0 && stopped === null)
        await new Promise<void>((resolve) => (wake = resolve));
      if (stopped !== null) throw new ReaderStopped(stopped);
      pulls -= 1;
      // A copy, because a block is only valid until the next one is asked for.
      const own = new Uint8Array(block);
      const bytes = own.length;
      post({ block: own }, [own.buffer]);
      onSent(bytes);
    }
    post({ end: true });
  } catch (cause) {
    if (!(cause instanceof ReaderStopped))
      post({ failed: cause instanceof Error ? cause.message : 'the stream broke' });
    throw cause;
  } finally {
    port.onmessage = null;
  }
}

/** The browser stopped taking bytes: the person cancelled the download, or the disk is full. */
export class ReaderStopped extends Error {
  override name = 'ReaderStopped';
}

/** The other end: a ReadableStream that asks for one block at a time and buffers a few. */
export function streamFromPort(port: MessagePort): ReadableStream<Uint8Array<ArrayBuffer>> {
  const post = (message: FromReader): void => port.postMessage(message);
  return new ReadableStream<Uint8Array<ArrayBuffer>>(
    {
      start(controller) {
        port.addEventListener('message', (event: MessageEvent<FromWriter>) => {
          if ('block' in event.data) controller.enqueue(event.data.block);
          else if ('end' in event.data) controller.close();
          else controller.error(new Error(event.data.failed));
        });
        port.start();
      },
      pull() {
        post({ pull: true });
      },
      cancel(reason) {
        post({ cancel: String(reason) });
        port.close();
      },
    },
    new CountQueuingStrategy({ highWaterMark: 4 }),
  );
}
