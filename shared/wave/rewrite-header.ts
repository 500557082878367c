import type { ByteSource } from '../bytes/byte-source.ts';
import { boundedReader, type BoundedReader } from '../bytes/bounded-reader.ts';
import { findDroppedCues, writeMarkers } from './edit-markers.ts';
import { writeList } from './edit-lists.ts';
import { tellsPersonalBytes, withoutPersonalText } from './personal-text.ts';
import type { ChunkPlace, TrackFormat, WaveReading } from './track-format.ts';
import { travellingContents, type ChunkChange } from './travelling-chunks.ts';
import {
  buildWaveHeader,
  writeFact,
  writeFmt,
  type Chunk,
  type FmtStyle,
  type WaveEnvelope,
} from './write-wave-header.ts';

/** Metadata beyond this, in all, does not travel: it is held in memory. */
const maxMetadataBytes = 16 * 1024 * 1024;

export type TrackReading = Extract<WaveReading, { kind: 'track' }>;

export type HeaderRewrite = {
  /** The file the metadata comes from, and what readWave said about it. */
  source: ByteSource;
  reading: TrackReading;
  /** The output. `aiff` and `aifc` are written as WAV; its timeReferenceFrames is not looked at. */
  format: TrackFormat;
  /** Bytes of samples between `before` and `after`. */
  dataBytes: number;
  /** Frames of silence put in front (positive) or dropped from the front (negative). */
  moveByFrames: number;
  /**
   * Frames since midnight the output begins at. Without it the time on the clock of every sample
   * stays: silence in front makes the file begin earlier. Give the source's own value where a
   * part was late and is pulled forward to where the others begin.
   */
  timeReferenceFrames?: number;
  /** Whether any sample differs; without it, whether format, length or start do. */
  audioChanged?: boolean;
};

/**
 * Everything around the samples of a track, for its copy in the package. Where the audio is
 * untouched and the metadata tells nothing personal, the bytes are those of the source, mistakes
 * included, and `unchanged` is true: the whole file can be copied. Otherwise sizes are right,
 * chunks are kept, corrected or left behind as travelling-chunks.ts says, in their old order.
 * Reads the source in small pieces; throws what it throws. Deterministic.
 */
export async function rewriteHeader(
  rewrite: HeaderRewrite,
): Promise<WaveEnvelope & { unchanged: boolean }> {
  const { source, reading, format, dataBytes, moveByFrames } = rewrite;
  const reader = boundedReader(source);
  const channelsChanged = format.channels !== reading.format.channels;
  const audioChanged =
    rewrite.audioChanged === true ||
    moveByFrames !== 0 ||
    channelsChanged ||
    dataBytes !== reading.layout.dataBytes ||
    !sameSamples(format, reading.format);
  const stamp = reading.format.timeReferenceFrames;
  const wantedStamp =
    stamp === null ? null : (rewrite.timeReferenceFrames ?? Math.max(0, stamp - moveByFrames));
  const sameStamp = wantedStamp === stamp;
  const change: ChunkChange = {
    audioChanged,
    channelsChanged,
    moveByFrames,
    frames: format.frames,
    timeReferenceFrames: sameStamp ? null : wantedStamp,
    sampleRateHz: reading.format.sampleRateHz,
    droppedCues: new Set(),
  };

  if (!isWave(reading.format)) return { ...newEnvelope(rewrite, change), unchanged: false };
  const metadata = await readMetadata(reader, reading.layout.chunks);
  if (!audioChanged && sameStamp && isFitToTravel(metadata, change)) {
    const copy = await copyEnvelope(reader, reading);
    if (copy) return { ...copy, unchanged: true };
  }
  return { ...correctedEnvelope(rewrite, change, metadata), unchanged: false };
}

function sameSamples(a: TrackFormat, b: TrackFormat): boolean {
  return (
    a.sampleRateHz === b.sampleRateHz &&
    a.encoding === b.encoding &&
    a.containerBits === b.containerBits &&
    a.bits === b.bits
  );
}

/** A chunk of the source; contents are null where it is not carried over. */
type SourceChunk = { id: string; place: ChunkPlace; bytes: Uint8Array | null };

/** Chunks that are written anew from the format, not carried over. */
const structuralIds = new Set(['fmt ', 'data', 'ds64', 'fact']);

async function readMetadata(
  reader: BoundedReader,
  places: readonly ChunkPlace[],
): Promise<SourceChunk[]> {
  const chunks: SourceChunk[] = [];
  let left = maxMetadataBytes;
  for (const place of places) {
    const { id, contentOffset, contentBytes } = place;
    const carried = !structuralIds.has(id) && contentBytes <= left;
    // A copy: the reader's window moves on.
    const bytes = carried
      ? new Uint8Array(await reader.readUpTo(contentOffset, contentBytes, contentBytes))
      : null;
    left -= bytes?.length ?? 0;
    chunks.push({ id, place, bytes });
  }
  return chunks;
}

function isFitToTravel(chunks: readonly SourceChunk[], change: ChunkChange): boolean {
  return chunks.every(
    ({ id, bytes }) =>
      structuralIds.has(id) || (bytes && travellingContents(id, bytes, change) === bytes),
  );
}

/** The source's own bytes around its audio; null where they are too many or something is in them. */
async function copyEnvelope(
  reader: BoundedReader,
  { layout }: TrackReading,
): Promise<WaveEnvelope | null> {
  const dataEnd = layout.dataOffset + layout.dataBytes;
  const afterBytes = reader.size - dataEnd;
  if (layout.dataOffset > maxMetadataBytes || afterBytes > maxMetadataBytes) return null;
  const before = new Uint8Array(await reader.readUpTo(0, layout.dataOffset, maxMetadataBytes));
  const after = new Uint8Array(await reader.readUpTo(dataEnd, afterBytes, maxMetadataBytes));
  const last = layout.chunks.at(-1)!;
  const claimed = last.contentOffset + last.contentBytes - dataEnd;
  // Bytes that belong to no chunk: whatever they are, they must not tell anything either.
  return tellsPersonalBytes(after.subarray(Math.max(0, claimed))) ? null : { before, after };
}

function correctedEnvelope(
  rewrite: HeaderRewrite,
  change: ChunkChange,
  metadata: readonly SourceChunk[],
): WaveEnvelope {
  const { reading, format, dataBytes } = rewrite;
  const cue = metadata.find(({ id }) => id === 'cue ')?.bytes;
  const cues = { ...change, droppedCues: cue ? findDroppedCues(cue, change) : change.droppedCues };
  const before: Chunk[] = [];
  const after: Chunk[] = [];
  for (const { id, place, bytes } of metadata) {
    const side = place.contentOffset < reading.layout.dataOffset ? before : after;
    if (id === 'fmt ' && !before.some((chunk) => chunk.id === 'fmt ')) {
      before.push(...formatChunks(rewrite, metadata));
    } else if (bytes) {
      const contents = travellingContents(id, bytes, cues);
      if (contents) side.push({ id, bytes: contents });
    }
  }
  const { container } = format;
  return buildWaveHeader({
    container: container === 'bw64' ? 'bw64' : 'wav',
    dataBytes,
    frames: format.frames,
    before,
    after,
  });
}

/** `fmt ` in the style of the source, `fact` where it belongs. */
function formatChunks(
  { reading, format }: HeaderRewrite,
  metadata: readonly SourceChunk[] = [],
): Chunk[] {
  const hadFact = metadata.some(({ id }) => id === 'fact');
  const chunks: Chunk[] = [{ id: 'fmt ', bytes: writeFmt(format, fmtStyle(reading, format)) }];
  if (hadFact || format.encoding === 'float') {
    chunks.push({ id: 'fact', bytes: writeFact(format.frames) });
  }
  return chunks;
}

function fmtStyle(reading: TrackReading, format: TrackFormat): FmtStyle {
  if (!isWave(reading.format)) return { kind: 'usual' };
  const { channelMask } = reading.layout;
  if (channelMask === null) return { kind: 'short' };
  // Another number of channels stands in front of other speakers.
  const sameChannels = format.channels === reading.format.channels;
  return { kind: 'extensible', channelMask: sameChannels ? channelMask : null };
}

function isWave({ container }: TrackFormat): boolean {
  return container === 'wav' || container === 'rf64' || container === 'bw64';
}

/** A WAV file for audio from another container: its markers and its name come along. */
function newEnvelope(rewrite: HeaderRewrite, change: ChunkChange): WaveEnvelope {
  const { reading, format, dataBytes } = rewrite;
  const markers = reading.markers.map(({ startFrame, label }) => ({
    startFrame,
    label: withoutPersonalText(label),
  }));
  const after = writeMarkers(markers, change);
  if (reading.trackName !== null) {
    const name = new TextEncoder().encode(`${withoutPersonalText(reading.trackName)}\0`);
    after.push({ id: 'LIST', bytes: writeList('INFO', [{ id: 'INAM', bytes: name }]) });
  }
  const before = formatChunks(rewrite);
  return buildWaveHeader({ container: 'wav', dataBytes, frames: format.frames, before, after });
}
