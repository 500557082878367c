import { readUint64 } from '../bytes/read-uint64.ts';

/**
 * The broadcast extension chunk of EBU Tech 3285 v2, section 2.3: fixed fields, then the coding
 * history. Offsets and lengths in bytes from the start of the chunk's contents.
 */
export const bextFields = {
  description: { offset: 0, bytes: 256 },
  originator: { offset: 256, bytes: 32 },
  originatorReference: { offset: 288, bytes: 32 },
  originationDate: { offset: 320, bytes: 10 },
  originationTime: { offset: 330, bytes: 8 },
  /** Frames since midnight, 64 bits, low word first. */
  timeReference: { offset: 338, bytes: 8 },
  version: { offset: 346, bytes: 2 },
  /** Since version 1: identifies the material (SMPTE 330M), all zero when there is none. */
  umid: { offset: 348, bytes: 64 },
  /** Since version 2: five signed 16-bit figures, 0x7fff when not measured. */
  loudness: { offset: 412, bytes: 10 },
  codingHistory: { offset: 602 },
} as const;

/**
 * TimeReference: when the first frame was recorded, in frames since midnight at the file's rate.
 * null where the chunk ends before it or the number is too large to be a time.
 */
export function readTimeReference(bext: Uint8Array): number | null {
  const { offset, bytes } = bextFields.timeReference;
  if (bext.length < offset + bytes) return null;
  const view = new DataView(bext.buffer, bext.byteOffset, bext.length);
  const frames = readUint64(view, offset);
  return Number.isSafeInteger(frames) ? frames : null;
}
