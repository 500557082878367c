import { crc32 } from '../bytes/crc32.ts';
import { Sha256 } from './sha256.ts';

/**
 * How checksums are made where a package is written: Node's crypto on the command line,
 * WebAssembly in a worker, plain TypeScript anywhere else.
 */
export type ChecksumEngine = {
  /** Continues a CRC-32 (as in zip) over `bytes`; 0 starts one. */
  crc32(bytes: Uint8Array, previous: number): number;
  /** A new SHA-256. Files are packed one after the other, so one is open at a time. */
  sha256(): { update(bytes: Uint8Array): void; digestHex(): string };
};

/** Needs nothing of the platform. */
export const plainChecksums: ChecksumEngine = { crc32, sha256: () => new Sha256() };

/** Length in bytes of the file before any checksum is known. */
export function checksumFileBytes(names: readonly string[]): number {
  const encoder = new TextEncoder();
  return names.reduce((sum, name) => sum + 64 + 2 + encoder.encode(name).length + 1, 0);
}

/**
 * The list that `sha256sum -c --strict` reads when run inside the package folder (GNU coreutils
 * manual, "md5sum invocation"): digest, two spaces, path. Names never hold a backslash or a line
 * break here (see safe-names.ts), which the format would have to escape.
 */
export function writeChecksumFile(sums: readonly { name: string; sha256: string }[]): string {
  return sums.map(({ name, sha256 }) => `${sha256}  ${name}\n`).join('');
}
