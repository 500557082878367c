import type { BoundedReader } from '../bytes/bounded-reader.ts';
import type { ChunkPlace } from './track-format.ts';

/** A chunk with the size its header gives, which may be more than the file holds. */
export type WalkedChunk = ChunkPlace & { declaredBytes: number };

export type ChunkWalk = {
  chunks: WalkedChunk[];
  /** Where the walk stopped: the end of the file, or the first byte that begins no chunk. */
  endOffset: number;
};

/**
 * A walk ends after this many chunks: real files have a dozen, and a file made of empty chunks
 * must not keep anybody busy.
 */
export const maxChunks = 2048;

/** Ids that are met in real files; used to decide whether a pad byte was forgotten. */
const knownIds = new Set(
  (
    'fmt |data|fact|LIST|list|bext|iXML|cue |plst|smpl|inst|acid|PEAK|JUNK|junk|PAD |FLLR|ds64|' +
    'levl|link|axml|chna|cart|umid|mext|qlty|id3 |ID3 |_PMX|aXML|DISP|strc|' +
    'COMM|SSND|FVER|MARK|INST|NAME|AUTH|ANNO|(c) |APPL|COMT|AESD|MIDI|CHAN'
  ).split('|'),
);

/** The four characters of an id; bytes beyond ASCII become the characters of Latin-1. */
export function chunkId(bytes: Uint8Array, at: number): string {
  return String.fromCharCode(
    bytes[at] ?? 0,
    bytes[at + 1] ?? 0,
    bytes[at + 2] ?? 0,
    bytes[at + 3] ?? 0,
  );
}

/** The place alone, as a layout keeps it. */
export function placeOf({ id, contentOffset, contentBytes }: WalkedChunk): ChunkPlace {
  return { id, contentOffset, contentBytes };
}

/** Contents of the first chunk of that id, at most `limit` bytes; null where there is none. */
export async function chunkContents(
  reader: BoundedReader,
  chunks: readonly ChunkPlace[],
  id: string,
  limit: number,
): Promise<Uint8Array | null> {
  const chunk = chunks.find((place) => place.id === id);
  return chunk ? reader.readUpTo(chunk.contentOffset, chunk.contentBytes, limit) : null;
}

function isPrintable(id: string): boolean {
  return /^[\x20-\x7e]{4}$/.test(id);
}

type SizeOf = (header: {
  id: string;
  declaredBytes: number;
  contentOffset: number;
}) => Promise<number> | number;

/**
 * Walks the chunks of a RIFF or IFF file from `offset`, reading their 8-byte headers only.
 * `sizeOf` may answer another size than the header's own 32 bits (RF64, streamed files); the
 * size of the form around the chunks is not looked at, because it is the field that is wrong
 * most often. Never fails: a walk that finds nothing sensible just ends.
 */
export async function walkChunks(
  reader: BoundedReader,
  offset: number,
  bigEndian: boolean,
  sizeOf: SizeOf = ({ declaredBytes }) => declaredBytes,
): Promise<ChunkWalk> {
  const chunks: WalkedChunk[] = [];
  let at = offset;
  while (chunks.length < maxChunks && at + 8 <= reader.size) {
    const header = await reader.read(at, 8);
    if (header.length < 8) break;
    const id = chunkId(header, 0);
    if (!isPrintable(id)) break;
    const view = new DataView(header.buffer, header.byteOffset, 8);
    const contentOffset = at + 8;
    const declaredBytes = await sizeOf({
      id,
      declaredBytes: view.getUint32(4, !bigEndian),
      contentOffset,
    });
    const contentBytes = Math.min(declaredBytes, reader.size - contentOffset);
    // Letters that are no chunk of ours and promise more than there is: garbage after the audio.
    if (contentBytes < declaredBytes && !knownIds.has(id) && chunks.length >= 2) break;
    chunks.push({ id, contentOffset, contentBytes, declaredBytes });
    at = await nextChunkOffset(reader, contentOffset + contentBytes, declaredBytes, bigEndian);
  }
  return { chunks, endOffset: Math.min(at, reader.size) };
}

/**
 * Chunks begin at even places: an odd chunk is followed by a pad byte its size does not count
 * (RIFF specification; EA IFF 85 says the same). Some writers forget it.
 */
async function nextChunkOffset(
  reader: BoundedReader,
  contentEnd: number,
  declaredBytes: number,
  bigEndian: boolean,
): Promise<number> {
  if (declaredBytes % 2 === 0 || contentEnd + 8 > reader.size)
    return contentEnd + (declaredBytes % 2);
  const bytes = await reader.read(contentEnd, 9);
  const forgotten = chunkId(bytes, 0);
  const padded = chunkId(bytes, 1);
  if (knownIds.has(padded)) return contentEnd + 1;
  if (knownIds.has(forgotten)) return contentEnd;
  // A pad byte is zero; letters in its place that begin a chunk of a possible size are none.
  const size = new DataView(bytes.buffer, bytes.byteOffset).getUint32(4, !bigEndian);
  const fits = isPrintable(forgotten) && contentEnd + 8 + size <= reader.size;
  return fits ? contentEnd : contentEnd + 1;
}
