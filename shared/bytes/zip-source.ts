import type { ByteSource, DroppedFile, OpenByteSource } from './byte-source.ts';
import { inflateSource } from './inflate-source.ts';
import { readZipDirectory, zipRefused, type ZipRecord } from './zip-directory.ts';
import { safeZipPath, type UnsafeName } from './zip-names.ts';

/** Why one entry is not offered; the others are. */
export type ZipProblemReason =
  | UnsafeName
  | 'symlink'
  | 'special-file'
  | 'encrypted'
  | 'nested-zip'
  | 'unknown-compression'
  | 'name-repeated'
  | 'damaged-entry';

/** `path` is the name as the zip has it; show it, never open it. */
export type ZipProblem = { path: string; reason: ZipProblemReason };

export type ZipListing = {
  files: ZippedFile[];
  problems: ZipProblem[];
};

/** `crc32` is what the zip claims of the unpacked bytes: unequal when measured means damage. */
export type ZippedFile = DroppedFile & { crc32: number };

export type ZipLimits = {
  maxEntries: number;
  /** Everything unpacked, in bytes. */
  maxUnpackedBytes: number;
  /** Unpacked bytes for one of the zip; only looked at beyond `ratioFromBytes`. */
  maxRatio: number;
  ratioFromBytes: number;
};

/**
 * A dropped session is some hundred files of some gigabytes. Audio hardly packs; silence does,
 * by a thousand to one, so the ratio only counts once it would cost somebody something.
 */
export const usualZipLimits: ZipLimits = {
  maxEntries: 20_000,
  maxUnpackedBytes: 1024 ** 4,
  maxRatio: 100,
  ratioFromBytes: 2 * 1024 ** 3,
};

const stored = 0;
const deflated = 8;
const localSignature = 0x04034b50;
const localBytes = 30;

/** Whether bytes begin like a zip, or like an empty one. */
export async function isZip(source: ByteSource): Promise<boolean> {
  const start = await source.read(0, 4);
  if (start.length < 4 || start[0] !== 0x50 || start[1] !== 0x4b) return false;
  return (start[2] === 3 && start[3] === 4) || (start[2] === 5 && start[3] === 6);
}

/**
 * Lists the files of a zip without unpacking anything. Names that lead out of a folder, links,
 * encrypted and nested zips are problems of one entry; a directory that cannot be trusted, or
 * entries that unpack to more than anybody sends, refuse the zip: AppError `zip-refused` with
 * details { reason, entry }. An entry throws the same when it proves to be damaged, or larger
 * than it said, while it is read. The source must stay open as long as the files are used.
 */
export async function openZip(
  source: ByteSource,
  limits: ZipLimits = usualZipLimits,
): Promise<ZipListing> {
  const directory = await readZipDirectory(source, limits.maxEntries);
  const limitOf = findLimits(directory.records, directory.offset);
  refuseBombs(directory.records, source.size, limits);

  const files: ZippedFile[] = [];
  const problems: ZipProblem[] = [];
  const paths = new Set<string>();
  for (const record of directory.records) {
    // Folders are told by the paths below them.
    if (record.name.endsWith('/') && record.unpackedBytes === 0) continue;
    const safe = safeZipPath(record.name);
    const reason = 'unsafe' in safe ? safe.unsafe : findProblem(record, paths.has(safe.path));
    if (reason !== null || 'unsafe' in safe) {
      problems.push({ path: record.name, reason: reason ?? 'no-name' });
      continue;
    }
    paths.add(safe.path);
    files.push({
      path: safe.path,
      size: record.unpackedBytes,
      crc32: record.crc32,
      open: () => openEntry(source, record, limitOf.get(record) ?? directory.offset),
    });
  }
  return { files, problems };
}

function findProblem(record: ZipRecord, isRepeated: boolean): ZipProblemReason | null {
  const fileType = record.unixMode & 0xf000;
  if (fileType === 0xa000) return 'symlink';
  if (fileType !== 0 && fileType !== 0x8000) return 'special-file';
  // Bit 0 encrypted, 6 strongly, 13 with hidden headers (APPNOTE 4.4.4).
  if (record.flags & 0x2041) return 'encrypted';
  if (record.method !== stored && record.method !== deflated) return 'unknown-compression';
  if (record.method === stored && record.packedBytes !== record.unpackedBytes) {
    return 'damaged-entry';
  }
  if (/\.zip$/i.test(record.name)) return 'nested-zip';
  return isRepeated ? 'name-repeated' : null;
}

/**
 * Where each entry has to end: at the next one or at the directory. Entries that share bytes are
 * how a small zip unpacks to a huge amount without any nesting.
 */
function findLimits(
  records: readonly ZipRecord[],
  directoryOffset: number,
): Map<ZipRecord, number> {
  const byOffset = [...records].sort((a, b) => a.localOffset - b.localOffset);
  const limits = new Map<ZipRecord, number>();
  for (const [index, record] of byOffset.entries()) {
    const limit = byOffset[index + 1]?.localOffset ?? directoryOffset;
    const leastEnd = record.localOffset + localBytes + record.nameBytes + record.packedBytes;
    if (leastEnd > limit) {
      throw zipRefused(
        index + 1 < byOffset.length ? 'overlapping-entries' : 'damaged-directory',
        record.name,
      );
    }
    limits.set(record, limit);
  }
  return limits;
}

function refuseBombs(records: readonly ZipRecord[], zipBytes: number, limits: ZipLimits): void {
  let unpacked = 0;
  for (const record of records) {
    unpacked += record.unpackedBytes;
    const tooDense = unpacked > limits.ratioFromBytes && unpacked > zipBytes * limits.maxRatio;
    if (tooDense || unpacked > limits.maxUnpackedBytes) throw zipRefused('too-large', record.name);
  }
}

/** Finds an entry's bytes behind its local header, which must agree with the directory. */
async function openEntry(
  source: ByteSource,
  record: ZipRecord,
  limit: number,
): Promise<OpenByteSource> {
  const refuse = (reason: string) => zipRefused(reason, record.name);
  const head = await source.read(record.localOffset, localBytes);
  if (head.length < localBytes) throw refuse('damaged-entry');
  const view = new DataView(head.buffer, head.byteOffset, head.length);
  if (view.getUint32(0, true) !== localSignature || view.getUint16(8, true) !== record.method) {
    throw refuse('damaged-entry');
  }
  const offset =
    record.localOffset + localBytes + view.getUint16(26, true) + view.getUint16(28, true);
  const { packedBytes, unpackedBytes } = record;
  if (offset + packedBytes > limit) throw refuse('overlapping-entries');
  return record.method === deflated
    ? inflateSource({ source, offset, packedBytes, unpackedBytes, refuse })
    : { ...partOf(source, offset, packedBytes), close: () => Promise.resolve() };
}

/** Part of a source as a source of its own. */
function partOf(source: ByteSource, start: number, size: number): ByteSource {
  return {
    size,
    read(offset, length) {
      const bytes = Math.max(0, Math.min(length, size - offset));
      return source.read(start + offset, bytes);
    },
    async *stream(offset, signal) {
      let left = size - offset;
      if (left <= 0) return;
      for await (const block of source.stream(start + offset, signal)) {
        yield block.subarray(0, left);
        left -= block.length;
        if (left <= 0) return;
      }
    },
  };
}
