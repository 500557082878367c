import { unzlibSync } from 'fflate';

const woffSignature = 0x774f4646;
const headerBytes = 44;
const woffEntryBytes = 20;
const sfntHeaderBytes = 12;
const sfntEntryBytes = 16;

/**
 * Unwraps a WOFF file (W3C, WOFF File Format 1.0, sections 3 to 5) to the plain font inside. The
 * PDF library's font reader takes WOFF too, but stumbles over a letter without outline at the end
 * of a table, because each table then is a buffer of its own. Throws for anything but WOFF 1.0.
 */
export function unwrapWoff(woff: Uint8Array): Uint8Array {
  const from = new DataView(woff.buffer, woff.byteOffset, woff.byteLength);
  if (woff.length < headerBytes || from.getUint32(0) !== woffSignature) {
    throw new Error('this font is no WOFF 1.0 file');
  }
  const count = from.getUint16(12);
  const font = new Uint8Array(from.getUint32(16));
  const to = new DataView(font.buffer);
  to.setUint32(0, from.getUint32(4));
  to.setUint16(4, count);
  // For binary search in the table list (OpenType, "Table directory").
  const steps = Math.floor(Math.log2(count));
  to.setUint16(6, 2 ** steps * sfntEntryBytes);
  to.setUint16(8, steps);
  to.setUint16(10, count * sfntEntryBytes - 2 ** steps * sfntEntryBytes);

  let at = sfntHeaderBytes + count * sfntEntryBytes;
  for (let index = 0; index < count; index++) {
    const entry = headerBytes + index * woffEntryBytes;
    const offset = from.getUint32(entry + 4);
    const packedBytes = from.getUint32(entry + 8);
    const bytes = from.getUint32(entry + 12);
    const packed = woff.subarray(offset, offset + packedBytes);
    const place = sfntHeaderBytes + index * sfntEntryBytes;
    to.setUint32(place, from.getUint32(entry));
    to.setUint32(place + 4, from.getUint32(entry + 16));
    to.setUint32(place + 8, at);
    to.setUint32(place + 12, bytes);
    font.set(packedBytes < bytes ? unzlibSync(packed) : packed, at);
    at += Math.ceil(bytes / 4) * 4;
  }
  return font;
}
