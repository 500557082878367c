import { execFile } from 'node:child_process';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { bytesSource, type ByteSource, type DroppedFile } from '#shared/bytes/byte-source.ts';
import { renderEntry } from '#shared/repair/render-entry.ts';
import type { Operation, PlannedEntry } from '#shared/repair/repair-plan.ts';
import { readWave } from '#shared/wave/read-wave.ts';

const execute = promisify(execFile);

/** A dropped file whose bytes are in memory, streamed in blocks of `blockBytes`. */
export function droppedBytes(path: string, bytes: Uint8Array, blockBytes = 1 << 20): DroppedFile {
  const source: ByteSource = {
    ...bytesSource(bytes),
    // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
    async *stream(offset) {
      // One buffer for all blocks, as a file handle does it: whoever keeps a block loses it.
      const block = new Uint8Array(blockBytes);
      for (let at = offset; at < bytes.length; at += blockBytes) {
        const part = bytes.subarray(at, at + blockBytes);
        block.set(part);
        yield block.subarray(0, part.length);
      }
    },
  };
  return {
    path,
    size: bytes.length,
    open: () => Promise.resolve({ ...source, close: () => Promise.resolve() }),
  };
}

/** What an entry with these operations makes of WAV or AIFF files, as a source. */
export async function rendered(
  files: readonly Uint8Array[],
  operations: Operation[],
  blockBytes?: number,
): Promise<ByteSource> {
  const tracks = await Promise.all(
    files.map(async (bytes, index) => {
      const file = droppedBytes(`source ${index}`, bytes, blockBytes);
      const reading = await readWave(bytesSource(bytes), file.path);
      if (reading.kind !== 'track') throw new Error(`source ${index} is no track`);
      return { file, reading, crc32: null };
    }),
  );
  const entry: PlannedEntry = {
    from: tracks.map(({ file }) => file.path),
    to: 'out.wav',
    folder: '',
    operations,
    rewriteAsWav: true,
  };
  return (await renderEntry(entry, tracks)).open();
}

export async function allBytes(source: ByteSource, offset = 0): Promise<Buffer> {
  const blocks: Buffer[] = [];
  for await (const block of source.stream(offset)) blocks.push(Buffer.from(block));
  return Buffer.concat(blocks);
}

/** Samples of a file as sox reads them, after sox effects, undithered; as 64-bit float. */
export async function soxSamples(
  inputs: readonly string[],
  effects: readonly string[] = [],
  combine: readonly string[] = [],
): Promise<Float64Array> {
  const args = ['-D', ...combine, ...inputs, '-t', 'f64', '-', ...effects];
  const { stdout: bytes } = await execute('sox', args, { maxBuffer: 1 << 28, encoding: 'buffer' });
  return new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length));
}

export async function savedIn(folder: string, name: string, bytes: Uint8Array): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, bytes);
  return path;
}
