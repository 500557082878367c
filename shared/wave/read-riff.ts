import type { BoundedReader } from '../bytes/bounded-reader.ts';
import { readUint64 } from '../bytes/read-uint64.ts';
import { otherFormatTags } from './format-tags.ts';
import { readFmt, type FmtReading } from './read-fmt.ts';
import { readRiffMetadata } from './read-riff-metadata.ts';
import { isStreamedSize } from './streamed-size.ts';
import type { WaveReading } from './track-format.ts';
import { placeOf, walkChunks, type WalkedChunk } from './walk-chunks.ts';

/** A 32-bit size that means "see ds64" in RF64 and "unknown" in a streamed RIFF. */
const sizeElsewhere = 0xffffffff;

/** The 64-bit sizes of an RF64 or BW64 file (EBU Tech 3306 section 3; ITU-R BS.2088). */
type Ds64 = { dataBytes: number; table: Map<string, number> };

/** ds64: riffSize u64, dataSize u64, sampleCount u64, tableLength u32, then (id4, u64) entries. */
function readDs64(bytes: Uint8Array): Ds64 | null {
  if (bytes.length < 24) return null;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const table = new Map<string, number>();
  const entries = bytes.length >= 28 ? view.getUint32(24, true) : 0;
  for (let i = 0, at = 28; i < entries && at + 12 <= bytes.length; i += 1, at += 12) {
    table.set(String.fromCharCode(...bytes.subarray(at, at + 4)), readUint64(view, at + 4));
  }
  return { dataBytes: readUint64(view, 8), table };
}

/**
 * Reads a RIFF, RF64 or BW64 file whose first twelve bytes were recognised. Writers that know no
 * RF64 let the 32 bits of the data size run over beyond 4 GiB: they still tell the rest.
 */
export async function readRiff(
  reader: BoundedReader,
  container: 'wav' | 'rf64' | 'bw64',
): Promise<WaveReading> {
  let ds64: Ds64 | null = null;
  let promised: number | null = null;

  const { chunks, endOffset } = await walkChunks(reader, 12, false, async (header) => {
    const { id, declaredBytes, contentOffset } = header;
    const available = reader.size - contentOffset;
    if (id === 'ds64' && ds64 === null && container !== 'wav') {
      ds64 = readDs64(await reader.readUpTo(contentOffset, declaredBytes, 4096));
      return declaredBytes;
    }
    let bytes = declaredBytes;
    if (declaredBytes === sizeElsewhere && ds64 !== null) {
      bytes = (id === 'data' ? ds64.dataBytes : ds64.table.get(id)) ?? declaredBytes;
    }
    if (id !== 'data') return bytes;
    if (
      isStreamedSize(bytes, available) ||
      (bytes === 0 && !(await chunkFollows(reader, contentOffset)))
    ) {
      return available;
    }
    const ranOver = container === 'wav' ? Math.floor((available - bytes) / 2 ** 32) : 0;
    if (ranOver > 0) return bytes + ranOver * 2 ** 32;
    promised ??= bytes;
    return bytes;
  });

  const fmtChunk = chunks.find(({ id }) => id === 'fmt ');
  const dataChunk = chunks.find(({ id }) => id === 'data');
  const cutShort = chunks.at(-1);
  if (!dataChunk && cutShort && cutShort.declaredBytes > cutShort.contentBytes) {
    return { kind: 'unreadable', reason: 'header-cut-short', byteOffset: reader.size };
  }
  if (!fmtChunk) return { kind: 'unreadable', reason: 'no-format-chunk', byteOffset: endOffset };
  const fmt = readFmt(await reader.readUpTo(fmtChunk.contentOffset, fmtChunk.contentBytes, 64));
  if (fmt.kind !== 'encoding') return notPlain(fmt, fmtChunk);
  if (!dataChunk) return { kind: 'unreadable', reason: 'no-data-chunk', byteOffset: endOffset };

  const { channelMask, ...encoding } = fmt.encoding;
  const bytesPerFrame = (encoding.containerBits / 8) * encoding.channels;
  const frames = Math.floor(dataChunk.contentBytes / bytesPerFrame);
  if (frames === 0) {
    return { kind: 'unreadable', reason: 'no-audio-in-data', byteOffset: dataChunk.contentOffset };
  }
  const { timeReferenceFrames, trackName, markers } = await readRiffMetadata(reader, chunks, {
    sampleRateHz: encoding.sampleRateHz,
    frames,
  });
  return {
    kind: 'track',
    format: { container, ...encoding, frames, timeReferenceFrames },
    layout: {
      chunks: chunks.map(placeOf),
      dataOffset: dataChunk.contentOffset,
      dataBytes: frames * bytesPerFrame,
      promisedDataBytes: promised,
      bytesPerFrame,
      bigEndian: false,
      unsigned: encoding.containerBits === 8,
      channelMask,
    },
    markers,
    trackName,
  };
}

/** Whether an empty data chunk is really followed by another chunk, not by audio. */
async function chunkFollows(reader: BoundedReader, offset: number): Promise<boolean> {
  if (offset >= reader.size) return true;
  const walk = await walkChunks(reader, offset, false);
  return walk.chunks.length > 0 && walk.endOffset === reader.size;
}

/** What is said about a file whose samples are not plain numbers. */
function notPlain(fmt: Exclude<FmtReading, { kind: 'encoding' }>, chunk: WalkedChunk): WaveReading {
  if (fmt.kind === 'impossible') {
    return { kind: 'unreadable', reason: fmt.reason, byteOffset: chunk.contentOffset + fmt.at };
  }
  const known = otherFormatTags[fmt.tag];
  return known
    ? { kind: 'other-audio', formatName: `${known.name} in a WAV file`, lossy: known.lossy }
    : { kind: 'unreadable', reason: 'unsupported-encoding', byteOffset: chunk.contentOffset };
}
