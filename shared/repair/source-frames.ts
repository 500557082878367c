import type { ByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';
import { bytesPerSample, decodeSamples, type SampleForm } from './sample-codec.ts';

/** A readable track among the dropped files. */
export type TrackSource = {
  /** Named in the error when the file has changed. */
  path?: string;
  source: ByteSource;
  format: TrackFormat;
  layout: WaveLayout;
};

/** The form the samples of a source have once they stand in a WAV file. */
export function formOf({ format }: Pick<TrackSource, 'format'>): SampleForm {
  return { encoding: format.encoding, bits: format.bits, containerBits: format.containerBits };
}

/**
 * The sample data of a source from `fromFrame` to its end, in whole frames, in the form a WAV
 * file has. A block may be changed by whoever takes it, and is valid until the next one is asked
 * for. Throws AppError `file-changed` where a source has fewer bytes than when it was read.
 */
export async function* sourceFrames(
  track: TrackSource,
  fromFrame: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const { layout, format } = track;
  const frameBytes = layout.bytesPerFrame;
  let left = (format.frames - fromFrame) * frameBytes;
  if (left <= 0) return;
  // One buffer for all blocks: what is left of a frame waits at its front for the rest.
  let buffer = new Uint8Array(0);
  let waiting = 0;
  const start = layout.dataOffset + fromFrame * frameBytes;
  for await (const block of track.source.stream(start, signal)) {
    signal?.throwIfAborted();
    const fresh = block.length > left ? block.subarray(0, left) : block;
    left -= fresh.length;
    const usable = waiting + fresh.length;
    buffer = withRoom(buffer, usable, waiting);
    buffer.set(fresh, waiting);
    const whole = usable - (usable % frameBytes);
    if (whole > 0) {
      const frames = buffer.subarray(0, whole);
      toWaveForm(frames, track);
      yield frames;
      buffer.copyWithin(0, whole, usable);
    }
    waiting = usable - whole;
    if (left === 0) return;
  }
  throw new AppError('file-changed', { path: track.path ?? '' });
}

/** A buffer of at least `bytes`, with the first `kept` bytes of the old one. */
function withRoom(buffer: Uint8Array, bytes: number, kept: number): Uint8Array<ArrayBuffer> {
  if (buffer.length >= bytes) return buffer as Uint8Array<ArrayBuffer>;
  const larger = new Uint8Array(bytes);
  larger.set(buffer.subarray(0, kept));
  return larger;
}

/**
 * Frames [startFrame, startFrame + frames) of a source as samples, full scale = 1, one array a
 * channel; shorter where the file ends earlier.
 */
export async function readFrames(
  track: TrackSource,
  startFrame: number,
  frames: number,
): Promise<Float32Array[]> {
  const { format, layout } = track;
  const wanted = Math.max(0, Math.min(frames, format.frames - startFrame));
  const read = await track.source.read(
    layout.dataOffset + startFrame * layout.bytesPerFrame,
    wanted * layout.bytesPerFrame,
  );
  const found = Math.floor(read.length / layout.bytesPerFrame);
  const bytes = read.slice(0, found * layout.bytesPerFrame);
  toWaveForm(bytes, track);
  const values = new Float64Array(found * format.channels);
  decodeSamples(bytes, formOf(track), values);
  return Array.from({ length: format.channels }, (_, channel) =>
    Float32Array.from({ length: found }, (_, frame) => values[frame * format.channels + channel]!),
  );
}

/** Big-endian samples are turned round, signed 8-bit ones become unsigned; in place. */
function toWaveForm(bytes: Uint8Array, { layout, format }: TrackSource): void {
  const width = bytesPerSample(format);
  if (width === 1) {
    if (!layout.unsigned) for (let i = 0; i < bytes.length; i++) bytes[i]! ^= 0x80;
    return;
  }
  if (!layout.bigEndian) return;
  const half = width >> 1;
  for (let at = 0; at < bytes.length; at += width) {
    for (let i = 0; i < half; i++) {
      const other = at + width - 1 - i;
      const kept = bytes[at + i]!;
      bytes[at + i] = bytes[other]!;
      bytes[other] = kept;
    }
  }
}
