import type { ByteSource } from '../bytes/byte-source.ts';
import { describeRender, renderFrames } from './render-frames.ts';
import type { PlannedEntry } from './repair-plan.ts';
import { bytesPerSample } from './sample-codec.ts';
import type { TrackSource } from './source-frames.ts';
import { waveHead } from './wave-head.ts';

/** Whether the entry's bytes are those of its file. */
export function isCopied(entry: PlannedEntry): boolean {
  return entry.operations.length === 0 && !entry.rewriteAsWav;
}

/**
 * The WAV file a planned entry becomes, as a source of known size that makes its bytes when they
 * are asked for, from any place on, always the same. `sources` as in `entry.from`.
 */
export function renderEntry(entry: PlannedEntry, sources: readonly TrackSource[]): ByteSource {
  const audio = describeRender(entry.operations, sources);
  const frameBytes = audio.channels * bytesPerSample(audio.form);
  const dataBytes = audio.frames * frameBytes;
  const head = waveHead(audio);
  const tail = new Uint8Array(dataBytes % 2);
  const size = head.length + dataBytes + tail.length;

  async function* stream(offset: number, signal?: AbortSignal): AsyncGenerator<Uint8Array> {
    if (offset < head.length) yield head.subarray(offset);
    const inData = Math.max(0, offset - head.length);
    if (inData < dataBytes) {
      const fromFrame = Math.floor(inData / frameBytes);
      let skip = inData - fromFrame * frameBytes;
      for await (const block of renderFrames(entry.operations, sources, fromFrame, signal)) {
        yield skip > 0 ? block.subarray(skip) : block;
        skip = 0;
      }
    }
    if (offset < size && tail.length > 0) {
      yield tail.subarray(Math.max(0, offset - head.length - dataBytes));
    }
  }

  return {
    size,
    stream,
    async read(offset, length) {
      const bytes = new Uint8Array(Math.max(0, Math.min(length, size - offset)));
      let at = 0;
      if (bytes.length === 0) return bytes;
      for await (const block of stream(offset)) {
        const part = block.subarray(0, bytes.length - at);
        bytes.set(part, at);
        at += part.length;
        if (at === bytes.length) break;
      }
      return bytes;
    },
  };
}
