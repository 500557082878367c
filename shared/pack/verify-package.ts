import type { DroppedFile } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import type { ChecksumEngine } from './checksums.ts';
import { checksumFileName } from '../naming/safe-names.ts';

/** What became of the files of a package since it was packed; paths inside the package folder. */
export type PackageVerification = {
  /** Files that have the checksum in the list. */
  same: number;
  /** Files that have other bytes, or cannot be read any more. */
  different: string[];
  /** Listed, but not there. */
  missing: string[];
  /** There, but not listed. */
  unlisted: string[];
  /** Lines of the list that are no checksum and name: the list itself is damaged. */
  damagedLines: number;
};

export type VerifyOptions = {
  signal?: AbortSignal | undefined;
  /** Told how many more bytes were read, after every block. */
  onBytes?: ((bytes: number) => void) | undefined;
};

/** More than any list of 20,000 long names needs. */
const mostListBytes = 16 * 1024 * 1024;

/**
 * Reads every file of a package and compares it with the package's own list of checksums. null
 * where there is no such list, because it is no package. `files` have paths inside the package
 * folder.
 */
export async function verifyPackage(
  files: readonly DroppedFile[],
  checksums: ChecksumEngine,
  { signal, onBytes }: VerifyOptions = {},
): Promise<PackageVerification | null> {
  const list = files.find(({ path }) => path.toLowerCase() === checksumFileName.toLowerCase());
  if (!list || list.size > mostListBytes) return null;
  const { sums, damagedLines } = readChecksumFile(await readText(list));
  const found: PackageVerification = {
    ...{ same: 0, different: [], missing: [], unlisted: [], damagedLines },
  };
  const waiting = new Map(sums);
  for (const file of files) {
    if (file === list) continue;
    const wanted = waiting.get(file.path);
    waiting.delete(file.path);
    if (wanted === undefined) found.unlisted.push(file.path);
    else if ((await sha256Of(file, checksums, signal, onBytes)) === wanted) found.same += 1;
    else found.different.push(file.path);
  }
  return { ...found, missing: [...waiting.keys()] };
}

/**
 * Reads the lines `sha256sum` writes (GNU coreutils manual, "md5sum invocation"): 64 hex digits, a
 * space, a space or an asterisk, the name. Both ends of line are taken, and a byte order mark.
 */
export function readChecksumFile(text: string): {
  sums: Map<string, string>;
  damagedLines: number;
} {
  const sums = new Map<string, string>();
  let damagedLines = 0;
  for (const line of text.replace(/^\uFEFF/, '').split(/\r?\n/)) {
    if (line === '') continue;
    const parts = /^([0-9a-f]{64}) [ *](.+)$/i.exec(line);
    if (parts) sums.set(parts[2]!, parts[1]!.toLowerCase());
    else damagedLines += 1;
  }
  return { sums, damagedLines };
}

async function readText(file: DroppedFile): Promise<string> {
  const source = await file.open();
  try {
    return new TextDecoder().decode(await source.read(0, source.size));
  } finally {
    await source.close();
  }
}

/** null for a file that can no longer be read: whatever it was, it is not that now. */
async function sha256Of(
  file: DroppedFile,
  checksums: ChecksumEngine,
  signal: AbortSignal | undefined,
  onBytes: VerifyOptions['onBytes'],
): Promise<string | null> {
  const hasher = checksums.sha256();
  let digest: string | null = null;
  try {
    const source = await file.open();
    try {
      for await (const block of source.stream(0, signal)) {
        hasher.update(block);
        onBytes?.(block.length);
      }
      digest = hasher.digestHex();
    } finally {
      await source.close();
    }
  } catch (cause) {
    const isDamaged =
      cause instanceof AppError && (cause.code === 'zip-refused' || cause.code === 'no-access');
    if (!isDamaged) throw cause;
    // Closes the hasher, of which only one is open at a time.
    hasher.digestHex();
  }
  return digest;
}
