import type { BoundedReader } from '../bytes/bounded-reader.ts';
import { decodeChunkText } from './chunk-text.ts';
import { maxChannels } from './format-limits.ts';
import { readAiffMarkers } from './read-markers.ts';
import { isStreamedSize } from './streamed-size.ts';
import type { TrackFormat, UnreadableReason, WaveReading } from './track-format.ts';
import { chunkContents, chunkId, placeOf, walkChunks } from './walk-chunks.ts';

const maxMarkBytes = 512 * 1024;

type PlainType = {
  encoding: 'pcm' | 'float';
  bits?: number;
  little?: boolean;
  unsigned?: boolean;
};

/**
 * AIFC compression types that compress nothing. From the AIFF-C draft of 1991 (NONE, fl32) and
 * the QuickTime codes programs write since (twos, sowt, in24 ...; common practice, no source).
 * `bits` where the code fixes it, otherwise the COMM chunk's own number.
 */
const plainTypes: Record<string, PlainType> = {
  NONE: { encoding: 'pcm' },
  twos: { encoding: 'pcm' },
  sowt: { encoding: 'pcm', little: true },
  'raw ': { encoding: 'pcm', bits: 8, unsigned: true },
  in24: { encoding: 'pcm', bits: 24 },
  in32: { encoding: 'pcm', bits: 32 },
  '42ni': { encoding: 'pcm', bits: 24, little: true },
  '23ni': { encoding: 'pcm', bits: 32, little: true },
  fl32: { encoding: 'float', bits: 32 },
  FL32: { encoding: 'float', bits: 32 },
  fl64: { encoding: 'float', bits: 64 },
  FL64: { encoding: 'float', bits: 64 },
};

/** Compression types that lose something, as people may know them. */
const lossyTypes: Record<string, string> = {
  ulaw: 'µ-law',
  ULAW: 'µ-law',
  alaw: 'A-law',
  ALAW: 'A-law',
  ima4: 'IMA ADPCM',
  MAC3: 'MACE 3:1',
  MAC6: 'MACE 6:1',
  'GSM ': 'GSM 6.10',
  QDMC: 'QDMC',
  G722: 'G.722',
  '.mp3': 'MP3',
};

/**
 * The 80-bit number of Apple's SANE that COMM keeps the sample rate in: sign and 15-bit exponent
 * biased by 16383, then a 64-bit mantissa whose whole part is its top bit. null for what is no
 * finite number. Fractional rates exist and are rounded: 22254.5454 Hz becomes 22255.
 */
export function readExtended80(bytes: Uint8Array): number | null {
  if (bytes.length < 10) return null;
  const view = new DataView(bytes.buffer, bytes.byteOffset, 10);
  const exponent = view.getUint16(0);
  if ((exponent & 0x7fff) === 0x7fff) return null;
  const mantissa = view.getUint32(2) * 2 ** 32 + view.getUint32(6);
  const value = mantissa * 2 ** ((exponent & 0x7fff) - 16383 - 63);
  // A mantissa of zero under a huge exponent is no number either.
  return Number.isFinite(value) ? Math.round(exponent & 0x8000 ? -value : value) : null;
}

/** What a COMM chunk says; `at` of an impossible one counts from the start of its contents. */
type CommReading =
  | {
      kind: 'encoding';
      encoding: Omit<TrackFormat, 'container' | 'frames' | 'timeReferenceFrames'>;
      /** 0 in a file nobody came back to. */
      promisedFrames: number;
      bigEndian: boolean;
      unsigned: boolean;
    }
  | { kind: 'other'; formatName: string }
  | { kind: 'impossible'; reason: UnreadableReason; at: number };

/** COMM: channels i16, frames u32, bits i16, rate in 80 bits; AIFC adds a compression type. */
function readComm(bytes: Uint8Array, container: 'aiff' | 'aifc'): CommReading {
  const impossible = (reason: UnreadableReason, at: number): CommReading => ({
    kind: 'impossible',
    reason,
    at,
  });
  if (bytes.length < 18) return impossible('header-cut-short', bytes.length);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const channels = view.getUint16(0);
  const sampleRateHz = readExtended80(bytes.subarray(8, 18));
  const type = container === 'aifc' && bytes.length >= 22 ? chunkId(bytes, 18) : 'NONE';
  const plain = plainTypes[type];
  if (!plain) {
    const lossy = lossyTypes[type];
    return lossy === undefined
      ? impossible('unsupported-encoding', 18)
      : { kind: 'other', formatName: `${lossy} in an AIFC file` };
  }
  const bits = plain.bits ?? view.getUint16(6);
  if (channels === 0 || channels > maxChannels) return impossible('impossible-format', 0);
  if (bits === 0) return impossible('impossible-format', 6);
  if (plain.encoding === 'pcm' && bits > 32) return impossible('unsupported-encoding', 6);
  if (sampleRateHz === null || sampleRateHz < 1 || sampleRateHz > 0xffffffff) {
    return impossible('impossible-format', 8);
  }
  const containerBits = Math.ceil(bits / 8) * 8;
  return {
    kind: 'encoding',
    encoding: { encoding: plain.encoding, sampleRateHz, bits, containerBits, channels },
    promisedFrames: view.getUint32(2),
    bigEndian: !plain.little,
    unsigned: plain.unsigned ?? false,
  };
}

/**
 * Reads an AIFF or AIFC file whose first twelve bytes were recognised (Apple AIFF 1.3, AIFF-C
 * draft of 1991). The frames COMM counts are the promise; SSND may hold fewer.
 */
export async function readAiff(
  reader: BoundedReader,
  container: 'aiff' | 'aifc',
): Promise<WaveReading> {
  let streamed = false;
  const { chunks, endOffset } = await walkChunks(reader, 12, true, (header) => {
    const { id, declaredBytes, contentOffset } = header;
    const available = reader.size - contentOffset;
    if (id !== 'SSND') return declaredBytes;
    // Even without audio SSND holds 8 bytes: zero is nobody's meaning.
    streamed = declaredBytes === 0 || isStreamedSize(declaredBytes, available);
    return streamed ? available : declaredBytes;
  });
  const unreadable = (reason: UnreadableReason, byteOffset: number): WaveReading => ({
    kind: 'unreadable',
    reason,
    byteOffset,
  });
  const commChunk = chunks.find(({ id }) => id === 'COMM');
  const ssnd = chunks.find(({ id }) => id === 'SSND');
  const last = chunks.at(-1);
  if (!ssnd && last && last.declaredBytes > last.contentBytes) {
    return unreadable('header-cut-short', reader.size);
  }
  if (!commChunk) return unreadable('no-format-chunk', endOffset);
  const commBytes = await reader.readUpTo(commChunk.contentOffset, commChunk.contentBytes, 64);
  const comm = readComm(commBytes, container);
  if (comm.kind === 'other') {
    return { kind: 'other-audio', formatName: comm.formatName, lossy: true };
  }
  if (comm.kind === 'impossible') return unreadable(comm.reason, commChunk.contentOffset + comm.at);
  if (!ssnd) return unreadable('no-data-chunk', endOffset);

  const head = await reader.read(ssnd.contentOffset, 8);
  const lead = head.length === 8 ? new DataView(head.buffer, head.byteOffset, 8).getUint32(0) : 0;
  const dataOffset = ssnd.contentOffset + 8 + lead;
  const bytesPerFrame = (comm.encoding.containerBits / 8) * comm.encoding.channels;
  const available = Math.max(0, ssnd.contentOffset + ssnd.contentBytes - dataOffset);
  const isPromised = !streamed && comm.promisedFrames > 0;
  const promised = isPromised ? comm.promisedFrames * bytesPerFrame : null;
  const frames = Math.floor(Math.min(available, promised ?? available) / bytesPerFrame);
  if (frames === 0) return unreadable('no-audio-in-data', Math.min(dataOffset, reader.size));

  const mark = await chunkContents(reader, chunks, 'MARK', maxMarkBytes);
  const name = await chunkContents(reader, chunks, 'NAME', 256);
  return {
    kind: 'track',
    format: { container, ...comm.encoding, frames, timeReferenceFrames: null },
    layout: {
      chunks: chunks.map(placeOf),
      dataOffset,
      dataBytes: frames * bytesPerFrame,
      promisedDataBytes: promised,
      bytesPerFrame,
      bigEndian: comm.bigEndian,
      unsigned: comm.unsigned,
      channelMask: null,
    },
    markers: mark ? readAiffMarkers(mark, frames) : [],
    trackName: (name && decodeChunkText(name)) || null,
  };
}
