import { decodeLatin1 } from './chunk-text.ts';
import { withoutPersonalText } from './personal-text.ts';
import { bextFields, readTimeReference } from './read-bext.ts';
import type { ChunkChange } from './travelling-chunks.ts';
import { ascii } from './write-wave-header.ts';

/** Not measured, in the five loudness fields of version 2 (EBU Tech 3285 v2). */
const notMeasured = 0x7fff;

/**
 * A bext chunk fit to travel, of the same length. Originator and its reference name a person or
 * a machine by their definition and are emptied; paths in the free texts are shortened. The time
 * reference follows a move; what was said about audio that a repair has changed is taken back
 * (loudness, and the UMID, which identifies the untouched material).
 */
export function editBext(bext: Uint8Array, change: ChunkChange): Uint8Array {
  const edited = new Uint8Array(bext);
  const within = (offset: number, bytes: number) =>
    edited.subarray(Math.min(offset, edited.length), Math.min(offset + bytes, edited.length));

  for (const field of [bextFields.originator, bextFields.originatorReference]) {
    within(field.offset, field.bytes).fill(0);
  }
  const { description, codingHistory } = bextFields;
  cleanText(within(description.offset, description.bytes));
  cleanText(within(codingHistory.offset, edited.length));

  const view = new DataView(edited.buffer);
  const stamp = bextFields.timeReference.offset;
  if (readTimeReference(edited) !== null && change.timeReferenceFrames !== null) {
    view.setBigUint64(stamp, BigInt(change.timeReferenceFrames), true);
  }
  if (change.audioChanged) {
    const { umid, loudness, version } = bextFields;
    const edition = edited.length >= version.offset + 2 ? view.getUint16(version.offset, true) : 0;
    if (edition >= 1) within(umid.offset, umid.bytes).fill(0);
    for (let at = loudness.offset; edition >= 2 && at < loudness.offset + loudness.bytes; at += 2) {
      if (at + 2 <= edited.length) view.setUint16(at, notMeasured, true);
    }
  }
  return edited;
}

/** Shortens paths in a text field in place; what becomes free is filled with NUL. */
function cleanText(field: Uint8Array): void {
  const text = decodeLatin1(field);
  const cleaned = withoutPersonalText(text);
  if (cleaned === text) return;
  field.fill(0);
  field.set(ascii(cleaned.slice(0, field.length)));
}
