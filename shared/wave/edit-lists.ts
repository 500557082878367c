import { decodeLatin1 } from './chunk-text.ts';
import { withoutPersonalText } from './personal-text.ts';
import type { ChunkChange } from './travelling-chunks.ts';
import { ascii, joinBytes, uint32, type Chunk } from './write-wave-header.ts';

/**
 * Fields of `LIST INFO` that name people or places (RIFF specification of 1991, INFO list chunk,
 * and the fields in use since): artist, engineer, technician, commissioner, copyright holder,
 * source, archive, producer, writer, music by, starring.
 */
const personalInfo = new Set('IART IENG ITCH ICMS ICOP ISRC IARL IPRO IWRI IMUS ISTR'.split(' '));

/** A LIST chunk fit to travel; null where nothing of it may. Lists of unknown type stay away. */
export function editList(list: Uint8Array, change: ChunkChange): Uint8Array | null {
  const type = decodeLatin1(list.subarray(0, 4));
  const chunks = splitList(list);
  if (!chunks || (type !== 'INFO' && type !== 'adtl')) return null;
  const kept: Chunk[] = [];
  for (const { id, bytes } of chunks) {
    if (type === 'INFO' && !personalInfo.has(id)) kept.push({ id, bytes: cleanText(bytes, 0) });
    if (type === 'adtl' && isKeptLabel(id, bytes, change)) {
      kept.push({ id, bytes: cleanText(bytes, id === 'ltxt' ? 20 : 4) });
    }
  }
  if (kept.length === 0) return null;
  return writeList(type, kept);
}

/** A LIST chunk's contents from its type and its parts. */
export function writeList(type: string, chunks: readonly Chunk[]): Uint8Array {
  const parts = chunks.flatMap(({ id, bytes }) => [
    ascii(id),
    uint32(bytes.length),
    bytes,
    new Uint8Array(bytes.length % 2),
  ]);
  return joinBytes([ascii(type), ...parts]);
}

/** Labels, notes and ranges of cues that are still there; files embedded in a list are not kept. */
function isKeptLabel(id: string, bytes: Uint8Array, change: ChunkChange): boolean {
  if (!['labl', 'note', 'ltxt'].includes(id) || bytes.length < 4) return false;
  const cueId = new DataView(bytes.buffer, bytes.byteOffset).getUint32(0, true);
  return !change.droppedCues.has(cueId);
}

/** Free text from `textOffset` on without paths and addresses, still ended by a NUL. */
function cleanText(bytes: Uint8Array, textOffset: number): Uint8Array {
  const text = decodeLatin1(bytes.subarray(textOffset));
  const cleaned = withoutPersonalText(text);
  return cleaned === text ? bytes : joinBytes([bytes.subarray(0, textOffset), ascii(cleaned)]);
}

/** The parts of a LIST chunk; null where their sizes do not add up. */
function splitList(list: Uint8Array): Chunk[] | null {
  const view = new DataView(list.buffer, list.byteOffset, list.length);
  const chunks: Chunk[] = [];
  let at = 4;
  while (at + 8 <= list.length) {
    const size = view.getUint32(at + 4, true);
    if (at + 8 + size > list.length) return null;
    const id = decodeLatin1(list.subarray(at, at + 4));
    chunks.push({ id, bytes: list.subarray(at + 8, at + 8 + size) });
    at += 8 + size + (size % 2);
  }
  return chunks;
}
