import type { ByteSource, DroppedFile, OpenByteSource } from '../bytes/byte-source.ts';
import { rewriteHeader, type TrackReading } from '../wave/rewrite-header.ts';
import type { WaveEnvelope } from '../wave/write-wave-header.ts';
import { describeRender, renderFrames } from './render-frames.ts';
import type { PlannedEntry } from './repair-plan.ts';
import { bytesPerSample } from './sample-codec.ts';
import type { TrackSource } from './source-frames.ts';

/** A dropped track that could be read. */
export type ReadTrack = {
  file: DroppedFile;
  reading: TrackReading;
  /** CRC-32 of the whole file as it was checked; null where it was not measured. */
  crc32: string | null;
};

/**
 * A track as it is packed: made from dropped files while it is read, always the same bytes. It
 * is opened, measured and packed like any other file; `entry` and `tracks` are there for whoever
 * does that in another thread.
 */
export type RenderedFile = DroppedFile & {
  entry: PlannedEntry;
  tracks: readonly ReadTrack[];
  /** What stands around the samples; null where the file is copied byte for byte. */
  envelope: WaveEnvelope | null;
};

/** Whether an entry has the very samples of its file, so that only metadata may differ. */
export function keepsSamples(entry: PlannedEntry): boolean {
  return entry.operations.length === 0 && !entry.rewriteAsWav;
}

/**
 * Prepares a track entry: reads headers, writes them anew, and knows the length from then on.
 * `tracks` as in `entry.from`. Throws AppError `no-access` where a file cannot be opened.
 */
export async function renderEntry(
  entry: PlannedEntry,
  tracks: readonly ReadTrack[],
): Promise<RenderedFile> {
  const first = tracks[0];
  if (!first) throw new Error('an entry needs a source');
  const { reading } = first;
  const copied = keepsSamples(entry);
  const audio = describeRender(
    entry.operations,
    tracks.map((track) => track.reading),
  );
  const frameBytes = audio.channels * bytesPerSample(audio.form);
  const dataBytes = copied ? reading.layout.dataBytes : audio.frames * frameBytes;

  const opened = await first.file.open();
  let envelope: WaveEnvelope | null;
  try {
    const rewritten = await rewriteHeader({
      source: opened,
      reading,
      format: { ...reading.format, channels: audio.channels, frames: audio.frames },
      dataBytes,
      moveByFrames: audio.movedByFrames,
      audioChanged: audio.samplesChange,
    });
    envelope = copied && rewritten.unchanged ? null : rewritten;
  } finally {
    await opened.close();
  }

  const size = envelope
    ? envelope.before.length + dataBytes + envelope.after.length
    : first.file.size;
  return {
    path: entry.to,
    size,
    entry,
    tracks,
    envelope,
    async open() {
      const sources = await openAll(tracks);
      const close = () => closeAll(sources);
      if (!envelope) return { ...sources[0]!, close };
      const samples = copied
        ? {
            frameBytes: 1,
            from: (at: number, signal?: AbortSignal) => rawBytes(sources[0]!, reading, at, signal),
          }
        : {
            frameBytes,
            from: (at: number, signal?: AbortSignal) =>
              renderFrames(entry.operations, trackSources(tracks, sources), at, signal),
          };
      return { ...wrapped(envelope, dataBytes, samples), close };
    },
  };
}

async function openAll(tracks: readonly ReadTrack[]): Promise<OpenByteSource[]> {
  const opened: OpenByteSource[] = [];
  try {
    for (const { file } of tracks) opened.push(await file.open());
  } catch (error) {
    await closeAll(opened);
    throw error;
  }
  return opened;
}

async function closeAll(sources: readonly OpenByteSource[]): Promise<void> {
  for (const source of sources) await source.close();
}

function trackSources(tracks: readonly ReadTrack[], sources: readonly ByteSource[]): TrackSource[] {
  return tracks.map(({ file, reading }, index) => ({
    path: file.path,
    source: sources[index]!,
    format: reading.format,
    layout: reading.layout,
  }));
}

/** The sample data as it lies in the file, uncopied, from a byte of it on. */
async function* rawBytes(
  source: ByteSource,
  { layout }: TrackReading,
  at: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  let left = layout.dataBytes - at;
  for await (const block of source.stream(layout.dataOffset + at, signal)) {
    if (left <= 0) return;
    yield block.length > left ? block.subarray(0, left) : block;
    left -= block.length;
  }
}

/** Samples that can be had from any frame on. */
type Samples = {
  frameBytes: number;
  from(frame: number, signal?: AbortSignal): AsyncIterable<Uint8Array>;
};

/** Header, samples, trailing chunks as one source. */
function wrapped({ before, after }: WaveEnvelope, dataBytes: number, samples: Samples): ByteSource {
  const size = before.length + dataBytes + after.length;

  async function* stream(offset: number, signal?: AbortSignal): AsyncGenerator<Uint8Array> {
    if (offset < before.length) yield before.subarray(offset);
    const inData = Math.max(0, offset - before.length);
    if (inData < dataBytes) {
      const frame = Math.floor(inData / samples.frameBytes);
      let skip = inData - frame * samples.frameBytes;
      for await (const block of samples.from(frame, signal)) {
        yield skip > 0 ? block.subarray(skip) : block;
        skip = 0;
      }
    }
    const inAfter = Math.max(0, offset - before.length - dataBytes);
    if (inAfter < after.length) yield after.subarray(inAfter);
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
      return bytes.subarray(0, at);
    },
  };
}
