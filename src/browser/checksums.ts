import { createSHA256, type IHasher } from 'hash-wasm';
import { crc32 } from '#shared/bytes/crc32.ts';
import type { ChecksumEngine } from '#shared/pack/checksums.ts';

/** Checksums for packing: SHA-256 in WebAssembly, hashers kept and used again. */
export async function loadChecksums(): Promise<ChecksumEngine> {
  const idle: IHasher[] = [await createSHA256()];
  return {
    crc32,
    sha256() {
      const hasher = idle.pop();
      // Files are packed one after the other; two open hashers would be a bug.
      if (!hasher) throw new Error('only one file is hashed at a time');
      hasher.init();
      return {
        update: (bytes) => void hasher.update(bytes),
        digestHex() {
          const digest = hasher.digest('hex');
          idle.push(hasher);
          return digest;
        },
      };
    },
  };
}
