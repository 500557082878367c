import { AppError } from '../errors.ts';
import { boundedReader, type BoundedReader } from './bounded-reader.ts';
import type { ByteSource } from './byte-source.ts';
import { readUint64 } from './read-uint64.ts';
import { decodeZipName } from './zip-names.ts';

/** Signatures and sizes of APPNOTE 6.3 (section 4.3), little-endian. */
const centralSignature = 0x02014b50;
const endSignature = 0x06054b50;
const zip64EndSignature = 0x06064b50;
const zip64LocatorSignature = 0x07064b50;
const centralBytes = 46;
const endBytes = 22;
const zip64EndBytes = 56;
const zip64LocatorBytes = 20;
const maxCommentBytes = 0xffff;
const zip64ExtraId = 0x0001;

/** A record of the central directory, as it claims to be. */
export type ZipRecord = {
  name: string;
  nameBytes: number;
  flags: number;
  method: number;
  crc32: number;
  packedBytes: number;
  unpackedBytes: number;
  localOffset: number;
  /** Type and rights as on Unix; 0 where the zip was made elsewhere. */
  unixMode: number;
};

export type ZipDirectory = {
  records: ZipRecord[];
  /** Where the central directory begins: no entry reaches beyond. */
  offset: number;
};

/**
 * Why a zip as a whole is refused. `not-a-zip` no end record; `damaged-directory` its records
 * contradict the file; `several-parts` one part of a set; `too-many-entries`, `overlapping-entries`
 * and `too-large` are how bombs are made.
 */
export type ZipRefusal =
  | 'not-a-zip'
  | 'damaged-directory'
  | 'several-parts'
  | 'too-many-entries'
  | 'overlapping-entries'
  | 'too-large';

/** details: { reason, entry } as the list of errors has it. */
export function zipRefused(reason: string, entry: string | null = null): AppError {
  return new AppError('zip-refused', { reason, entry });
}

/**
 * Reads the directory at the end of a zip, plain or Zip64, in pieces of at most 64 KiB. Nothing
 * of the entries themselves is read. Throws AppError `zip-refused` with a ZipRefusal.
 */
export async function readZipDirectory(
  source: ByteSource,
  maxEntries: number,
): Promise<ZipDirectory> {
  const reader = boundedReader(source, 32 * 1024);
  const end = await readEnd(reader);
  if (end.entries > maxEntries) throw zipRefused('too-many-entries');
  if (end.offset + end.bytes > end.at) throw zipRefused('damaged-directory');

  const records: ZipRecord[] = [];
  let at = end.offset;
  while (records.length < end.entries) {
    const head = await reader.read(at, centralBytes);
    if (head.length < centralBytes) throw zipRefused('damaged-directory');
    const view = viewOf(head);
    if (view.getUint32(0, true) !== centralSignature) throw zipRefused('damaged-directory');
    const nameBytes = view.getUint16(28, true);
    const extraBytes = view.getUint16(30, true);
    const commentBytes = view.getUint16(32, true);
    const name = await reader.read(at + centralBytes, nameBytes);
    const decoded = decodeZipName(name);
    const extra = await reader.read(at + centralBytes + nameBytes, extraBytes);
    records.push(
      withZip64(extra, {
        name: decoded,
        nameBytes,
        flags: view.getUint16(8, true),
        method: view.getUint16(10, true),
        crc32: view.getUint32(16, true),
        packedBytes: view.getUint32(20, true),
        unpackedBytes: view.getUint32(24, true),
        localOffset: view.getUint32(42, true),
        unixMode: view.getUint32(38, true) >>> 16,
      }),
    );
    at += centralBytes + nameBytes + extraBytes + commentBytes;
    if (at > end.at) throw zipRefused('damaged-directory');
  }
  return { records, offset: end.offset };
}

type DirectoryEnd = { entries: number; bytes: number; offset: number; at: number };

/** The end record: last in the file but for a comment. */
async function readEnd(reader: BoundedReader): Promise<DirectoryEnd> {
  const tailBytes = Math.min(reader.size, endBytes + maxCommentBytes);
  const tailOffset = reader.size - tailBytes;
  const tail = await reader.readUpTo(tailOffset, tailBytes, tailBytes);
  const view = viewOf(tail);
  for (let at = tail.length - endBytes; at >= 0; at -= 1) {
    if (view.getUint32(at, true) !== endSignature) continue;
    if (at + endBytes + view.getUint16(at + 20, true) > tail.length) continue;
    const end = {
      entries: view.getUint16(at + 10, true),
      bytes: view.getUint32(at + 12, true),
      offset: view.getUint32(at + 16, true),
      at: tailOffset + at,
    };
    const disks = [view.getUint16(at + 4, true), view.getUint16(at + 6, true)];
    const large = end.entries === 0xffff || end.bytes === 0xffffffff || end.offset === 0xffffffff;
    const zip64 = large ? await readZip64End(reader, end.at) : null;
    if (!zip64 && disks.some((disk) => disk !== 0)) throw zipRefused('several-parts');
    return zip64 ?? end;
  }
  throw zipRefused('not-a-zip');
}

/** null where there is no Zip64 locator: exactly 65,535 entries are legal without one. */
async function readZip64End(reader: BoundedReader, endAt: number): Promise<DirectoryEnd | null> {
  const locatorAt = endAt - zip64LocatorBytes;
  if (locatorAt < 0) return null;
  const locator = await reader.read(locatorAt, zip64LocatorBytes);
  if (viewOf(locator).getUint32(0, true) !== zip64LocatorSignature) return null;
  const at = readUint64(viewOf(locator), 8);
  const end = await reader.read(at, zip64EndBytes);
  if (end.length < zip64EndBytes || viewOf(end).getUint32(0, true) !== zip64EndSignature) {
    throw zipRefused('damaged-directory');
  }
  const view = viewOf(end);
  if (view.getUint32(16, true) !== 0 || view.getUint32(20, true) !== 0) {
    throw zipRefused('several-parts');
  }
  return {
    entries: readUint64(view, 32),
    bytes: readUint64(view, 40),
    offset: readUint64(view, 48),
    at,
  };
}

/**
 * Zip64 extra field (APPNOTE 4.5.3): 64-bit values, only for the fields that hold 0xffffffff, in
 * the order unpacked size, packed size, offset.
 */
function withZip64(extra: Uint8Array, record: ZipRecord): ZipRecord {
  const view = viewOf(extra);
  for (let at = 0; at + 4 <= extra.length;) {
    const size = view.getUint16(at + 2, true);
    if (view.getUint16(at, true) === zip64ExtraId) {
      const end = Math.min(at + 4 + size, extra.length);
      let field = at + 4;
      const widen = (value: number): number => {
        if (value !== 0xffffffff || field + 8 > end) return value;
        field += 8;
        return readUint64(view, field - 8);
      };
      const unpackedBytes = widen(record.unpackedBytes);
      const packedBytes = widen(record.packedBytes);
      return { ...record, unpackedBytes, packedBytes, localOffset: widen(record.localOffset) };
    }
    at += 4 + size;
  }
  return record;
}

function viewOf(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
}
