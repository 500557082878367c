import type { TrackFormat } from './track-format.ts';

/** A chunk with its contents in memory. */
export type Chunk = { id: string; bytes: Uint8Array };

/** What stands around the sample data of a WAV file. */
export type WaveEnvelope = {
  /** Everything up to the first sample. */
  before: Uint8Array;
  /** The pad byte where the data is odd, then the trailing chunks. */
  after: Uint8Array;
};

/** A 32-bit size field that says "look into ds64" (EBU Tech 3306). */
const sizeElsewhere = 0xffffffff;
const ds64Bytes = 28;

/** Speaker masks for plain channel counts (Microsoft, WAVEFORMATEXTENSIBLE): front, then back. */
const usualMasks: Record<number, number> = { 1: 0x4, 2: 0x3, 4: 0x33, 6: 0x3f, 8: 0x63f };

/** Bytes 2 to 15 of KSDATAFORMAT_SUBTYPE_PCM and _IEEE_FLOAT; the format tag stands before them. */
const subFormatTail = [0, 0, 0, 0, 0x10, 0, 0x80, 0, 0, 0xaa, 0, 0x38, 0x9b, 0x71];

/**
 * How a `fmt ` chunk says it. `usual` is Microsoft's rule: the long form from 17 bits, from three
 * channels, and for valid bits that do not fill their bytes. Many programs write 24 bits in the
 * short form all the same, and are read everywhere.
 */
export type FmtStyle =
  { kind: 'usual' | 'short' } | { kind: 'extensible'; channelMask: number | null };

/** Contents of a `fmt ` chunk: 16 bytes for PCM, 18 for float, 40 for WAVEFORMATEXTENSIBLE. */
export function writeFmt(format: TrackFormat, style: FmtStyle = { kind: 'usual' }): Uint8Array {
  const { encoding, channels, bits, containerBits, sampleRateHz } = format;
  const isPcm = encoding === 'pcm';
  const fitsShort = channels <= 2 && bits === containerBits;
  const isUsuallyShort = fitsShort && !(isPcm && containerBits > 16);
  const extensible =
    style.kind === 'extensible' || !(style.kind === 'short' ? fitsShort : isUsuallyShort);
  const channelMask = style.kind === 'extensible' ? style.channelMask : null;
  const bytes = new Uint8Array(extensible ? 40 : isPcm ? 16 : 18);
  const view = new DataView(bytes.buffer);
  const tag = isPcm ? 1 : 3;
  const bytesPerFrame = (containerBits / 8) * channels;
  view.setUint16(0, extensible ? 0xfffe : tag, true);
  view.setUint16(2, channels, true);
  view.setUint32(4, sampleRateHz, true);
  view.setUint32(8, sampleRateHz * bytesPerFrame, true);
  view.setUint16(12, bytesPerFrame, true);
  view.setUint16(14, containerBits, true);
  if (extensible) {
    view.setUint16(16, 22, true);
    view.setUint16(18, bits, true);
    view.setUint32(20, channelMask ?? usualMasks[channels] ?? 0, true);
    view.setUint16(24, tag, true);
    bytes.set(subFormatTail, 26);
  }
  return bytes;
}

/**
 * Lays out a WAV file around `dataBytes` of samples: RIFF where all sizes fit 32 bits, otherwise
 * RF64 with its ds64 chunk. `bw64` stays BW64 at any size, because what else is in such a file
 * refers to it. Chunks keep their order; among those before the data stands `fmt `.
 */
export function buildWaveHeader(file: {
  container: 'wav' | 'rf64' | 'bw64';
  dataBytes: number;
  frames: number;
  before: readonly Chunk[];
  after: readonly Chunk[];
}): WaveEnvelope {
  const { dataBytes, frames } = file;
  const after = joinBytes([new Uint8Array(dataBytes % 2), ...file.after.map(chunkBytes)]);
  const chunksBefore = joinBytes(file.before.map(chunkBytes));
  const plainSize = 4 + chunksBefore.length + 8 + dataBytes + after.length;
  const large = file.container === 'bw64' || plainSize >= sizeElsewhere;
  const riffSize = plainSize + (large ? 8 + ds64Bytes : 0);

  const form = large ? (file.container === 'bw64' ? 'BW64' : 'RF64') : 'RIFF';
  const start = joinBytes([
    ascii(form),
    uint32(large ? sizeElsewhere : riffSize),
    ascii('WAVE'),
    large ? chunkBytes({ id: 'ds64', bytes: writeDs64(riffSize, dataBytes, frames) }) : noBytes,
  ]);
  const dataHeader = [ascii('data'), uint32(large ? sizeElsewhere : dataBytes)];
  return { before: joinBytes([start, chunksBefore, ...dataHeader]), after };
}

const noBytes = new Uint8Array(0);

function writeDs64(riffSize: number, dataBytes: number, frames: number): Uint8Array {
  const view = new DataView(new ArrayBuffer(ds64Bytes));
  view.setBigUint64(0, BigInt(riffSize), true);
  view.setBigUint64(8, BigInt(dataBytes), true);
  view.setBigUint64(16, BigInt(frames), true);
  return new Uint8Array(view.buffer);
}

/** The `fact` chunk: how many frames there are, for what is not plain PCM. */
export function writeFact(frames: number): Uint8Array {
  return uint32(Math.min(frames, sizeElsewhere));
}

/** A chunk as it stands in the file, with its pad byte. */
function chunkBytes({ id, bytes }: Chunk): Uint8Array {
  return joinBytes([ascii(id), uint32(bytes.length), bytes, new Uint8Array(bytes.length % 2)]);
}

export function joinBytes(parts: readonly Uint8Array[]): Uint8Array {
  const joined = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    joined.set(part, at);
    at += part.length;
  }
  return joined;
}

export function uint32(value: number): Uint8Array {
  const bytes = new Uint8Array(4);
  new DataView(bytes.buffer).setUint32(0, value, true);
  return bytes;
}

/** One byte a character: ids, and text that was decoded as Latin-1. */
export function ascii(text: string): Uint8Array {
  return Uint8Array.from(text, (character) => character.charCodeAt(0));
}
