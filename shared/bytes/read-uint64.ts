/**
 * A 64-bit little-endian number, low word first, as RF64, bext and Zip64 have it. Beyond 2^53 it
 * is no longer exact: sizes of that order are damage, and are compared with the file's own.
 */
export function readUint64(view: DataView, at: number): number {
  return view.getUint32(at, true) + view.getUint32(at + 4, true) * 2 ** 32;
}
