/**
 * Writes stored (uncompressed) zip files as a stream: sizes and CRCs are known before the bytes,
 * so there are no data descriptors, and nothing in the file depends on the clock, the time zone
 * or chance. Zip64 records appear only where a field overflows. Structure: PKWARE APPNOTE 6.3.10,
 * sections 4.3.7 (local header), 4.3.12 (central directory), 4.3.14-16 (end records), 4.5.3
 * (Zip64 extra field).
 */

/** One file of the zip. */
export type ZipEntry = {
  /** Path with `/`. */
  name: string;
  size: number;
  /** CRC-32 of the contents. Asked for when the entry's turn has come, so it may be known late. */
  crc32: () => number;
  /** Exactly `size` bytes, in blocks that need to be valid only until the next is asked for. */
  stream: (signal?: AbortSignal) => AsyncIterable<Uint8Array>;
};

const localHeaderBytes = 30;
const centralHeaderBytes = 46;
const endRecordBytes = 22;
const zip64EndRecordBytes = 56;
const zip64LocatorBytes = 20;

const max16 = 0xffff;
const max32 = 0xffffffff;

const utf8NameFlag = 0x0800;
/** 1980-01-01 00:00, the first moment the format knows. */
const dosTime = 0;
const dosDate = (1 << 5) | 1;
/** Made on a system with POSIX permissions (3), by version 4.5 of the specification. */
const madeBy = (3 << 8) | 45;
/** Regular file, rw-r--r--. */
const externalAttributes = 0o100644 * 0x10000;

type PlacedEntry = { nameBytes: Uint8Array; size: number; offset: number };

function place(entries: readonly ZipEntry[]): { placed: PlacedEntry[]; directoryOffset: number } {
  const encoder = new TextEncoder();
  let offset = 0;
  const placed = entries.map((entry) => {
    const nameBytes = encoder.encode(entry.name);
    if (nameBytes.length > max16) throw new Error('a zip entry name is too long');
    const here = { nameBytes, size: entry.size, offset };
    offset += localHeaderBytes + nameBytes.length + localExtraBytes(entry.size) + entry.size;
    return here;
  });
  return { placed, directoryOffset: offset };
}

/** A field that holds the largest value says "look into the extra field", so that value overflows. */
const overflows = (value: number): boolean => value >= max32;

const localExtraBytes = (size: number): number => (overflows(size) ? 20 : 0);

function centralExtraBytes({ size, offset }: PlacedEntry): number {
  const bytes = (overflows(size) ? 16 : 0) + (overflows(offset) ? 8 : 0);
  return bytes === 0 ? 0 : 4 + bytes;
}

function directoryBytes(placed: readonly PlacedEntry[]): number {
  return placed.reduce(
    (sum, entry) => sum + centralHeaderBytes + entry.nameBytes.length + centralExtraBytes(entry),
    0,
  );
}

function needsZip64End(count: number, directorySize: number, directoryOffset: number): boolean {
  return count >= max16 || overflows(directorySize) || overflows(directoryOffset);
}

/** Exact length in bytes of the zip these entries will make. */
export function zipSize(entries: readonly ZipEntry[]): number {
  const { placed, directoryOffset } = place(entries);
  const directorySize = directoryBytes(placed);
  const zip64 = needsZip64End(entries.length, directorySize, directoryOffset);
  return (
    directoryOffset +
    directorySize +
    (zip64 ? zip64EndRecordBytes + zip64LocatorBytes : 0) +
    endRecordBytes
  );
}

/** A record built field by field, little-endian. */
function record(size: number, write: (put: Put) => void): Uint8Array {
  const bytes = new Uint8Array(size);
  const view = new DataView(bytes.buffer);
  let at = 0;
  write({
    u16: (value) => {
      view.setUint16(at, value, true);
      at += 2;
    },
    u32: (value) => {
      view.setUint32(at, value, true);
      at += 4;
    },
    u64: (value) => {
      view.setBigUint64(at, BigInt(value), true);
      at += 8;
    },
    bytes: (value) => {
      bytes.set(value, at);
      at += value.length;
    },
  });
  if (at !== size) throw new Error('a zip record has another length than planned');
  return bytes;
}

type Put = {
  u16(value: number): void;
  u32(value: number): void;
  u64(value: number): void;
  bytes(value: Uint8Array): void;
};

const capped = (value: number): number => Math.min(value, max32);

function localHeader({ nameBytes, size }: PlacedEntry, crc: number): Uint8Array {
  const extra = localExtraBytes(size);
  return record(localHeaderBytes + nameBytes.length + extra, (put) => {
    put.u32(0x04034b50);
    put.u16(extra > 0 ? 45 : 20);
    put.u16(utf8NameFlag);
    put.u16(0);
    put.u16(dosTime);
    put.u16(dosDate);
    put.u32(crc);
    put.u32(capped(size));
    put.u32(capped(size));
    put.u16(nameBytes.length);
    put.u16(extra);
    put.bytes(nameBytes);
    if (extra > 0) {
      put.u16(0x0001);
      put.u16(16);
      put.u64(size);
      put.u64(size);
    }
  });
}

function centralHeader(entry: PlacedEntry, crc: number): Uint8Array {
  const { nameBytes, size, offset } = entry;
  const extra = centralExtraBytes(entry);
  return record(centralHeaderBytes + nameBytes.length + extra, (put) => {
    put.u32(0x02014b50);
    put.u16(madeBy);
    put.u16(extra > 0 ? 45 : 20);
    put.u16(utf8NameFlag);
    put.u16(0);
    put.u16(dosTime);
    put.u16(dosDate);
    put.u32(crc);
    put.u32(capped(size));
    put.u32(capped(size));
    put.u16(nameBytes.length);
    put.u16(extra);
    put.u16(0);
    put.u16(0);
    put.u16(0);
    put.u32(externalAttributes);
    put.u32(capped(offset));
    put.bytes(nameBytes);
    if (extra > 0) {
      put.u16(0x0001);
      put.u16(extra - 4);
      if (overflows(size)) {
        put.u64(size);
        put.u64(size);
      }
      if (overflows(offset)) put.u64(offset);
    }
  });
}

function endRecords(count: number, directorySize: number, directoryOffset: number): Uint8Array {
  const zip64 = needsZip64End(count, directorySize, directoryOffset);
  const zip64Bytes = zip64 ? zip64EndRecordBytes + zip64LocatorBytes : 0;
  return record(zip64Bytes + endRecordBytes, (put) => {
    if (zip64) {
      put.u32(0x06064b50);
      put.u64(zip64EndRecordBytes - 12);
      put.u16(madeBy);
      put.u16(45);
      put.u32(0);
      put.u32(0);
      put.u64(count);
      put.u64(count);
      put.u64(directorySize);
      put.u64(directoryOffset);
      put.u32(0x07064b50);
      put.u32(0);
      put.u64(directoryOffset + directorySize);
      put.u32(1);
    }
    put.u32(0x06054b50);
    put.u16(0);
    put.u16(0);
    put.u16(Math.min(count, max16));
    put.u16(Math.min(count, max16));
    put.u32(capped(directorySize));
    put.u32(capped(directoryOffset));
    put.u16(0);
  });
}

/**
 * The zip's bytes, in order. Nothing is read before it is asked for, so a slow disk holds the
 * reading back; the blocks of the entries are passed on uncopied. Throws when a stream gives
 * another number of bytes than its entry promised, and at the next block after an abort.
 */
export async function* writeZip(
  entries: readonly ZipEntry[],
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const { placed, directoryOffset } = place(entries);
  const crcs: number[] = [];
  for (const [index, entry] of entries.entries()) {
    signal?.throwIfAborted();
    const crc = entry.crc32();
    crcs.push(crc);
    yield localHeader(placed[index] as PlacedEntry, crc);
    let written = 0;
    for await (const block of entry.stream(signal)) {
      signal?.throwIfAborted();
      written += block.length;
      if (written > entry.size) break;
      yield block;
    }
    if (written !== entry.size) throw new Error('a zip entry has another length than promised');
  }
  // The directory goes out in pieces: with 100,000 entries it is several megabytes.
  for (const [index, entry] of placed.entries()) {
    yield centralHeader(entry, crcs[index] as number);
  }
  yield endRecords(entries.length, directoryBytes(placed), directoryOffset);
}
