import type { OpenByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import { checksumFileBytes, writeChecksumFile } from './checksums.ts';
import { checksumFileName } from '../naming/safe-names.ts';
import type { ChecksumEngine } from './checksums.ts';
import { zipSize, writeZip, type ZipEntry } from './zip-writer.ts';

/** One file of the package, of known length and content, that is opened when its turn comes. */
export type PackedFile = {
  /** Path inside the package folder. */
  to: string;
  bytes: number;
  crc32: number;
  /** The dropped files it comes from; empty for what is made here. */
  from: readonly string[];
  open(): Promise<OpenByteSource>;
};

/** A package that is ready to be written: its length is known before its first byte. */
export type Package = {
  /** `<folder>.zip`. */
  fileName: string;
  bytes: number;
  /**
   * The zip, block by block; a block is valid until the next one is asked for. Throws AppError
   * `file-changed` where a file no longer has the bytes that were checked: what was written so
   * far is worthless then.
   */
  stream(signal?: AbortSignal): AsyncGenerator<Uint8Array, void, void>;
};

/** A file that is made here and held in memory. */
export function madeFile(to: string, bytes: Uint8Array, checksums: ChecksumEngine): PackedFile {
  return {
    to,
    bytes: bytes.length,
    crc32: checksums.crc32(bytes, 0),
    from: [],
    open: () =>
      Promise.resolve({
        size: bytes.length,
        read: (offset, length) => Promise.resolve(bytes.subarray(offset, offset + length)),
        // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
        async *stream(offset) {
          yield bytes.subarray(offset);
        },
        close: () => Promise.resolve(),
      }),
  };
}

/**
 * Lays the files out as a zip, the list of their checksums last: every file is read once, hashed
 * and compared with the CRC of the check on the way.
 */
export function packFiles(
  folderName: string,
  files: readonly PackedFile[],
  checksums: ChecksumEngine,
): Package {
  const names = files.map(({ to }) => to);
  const layOut = (): ZipEntry[] => {
    const sums: { name: string; sha256: string }[] = [];
    let list: Uint8Array | null = null;
    const writeList = () => (list ??= new TextEncoder().encode(writeChecksumFile(sums)));
    return [
      ...files.map((file) => ({
        name: `${folderName}/${file.to}`,
        size: file.bytes,
        crc32: () => file.crc32,
        stream: (signal?: AbortSignal) =>
          streamVerified(file, checksums, (sha256) => sums.push({ name: file.to, sha256 }), signal),
      })),
      {
        name: `${folderName}/${checksumFileName}`,
        size: checksumFileBytes(names),
        crc32: () => checksums.crc32(writeList(), 0),
        // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
        stream: async function* () {
          yield writeList();
        },
      },
    ];
  };
  return {
    fileName: `${folderName}.zip`,
    bytes: zipSize(layOut()),
    stream: (signal) => writeZip(layOut(), signal),
  };
}

async function* streamVerified(
  file: PackedFile,
  checksums: ChecksumEngine,
  hashed: (sha256: string) => void,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const changed = () => new AppError('file-changed', { path: file.from[0] ?? file.to });
  const source = await file.open();
  const sha256 = checksums.sha256();
  let digest: string | null = null;
  try {
    if (source.size !== file.bytes) throw changed();
    let crc = 0;
    let bytes = 0;
    for await (const block of source.stream(0, signal)) {
      bytes += block.length;
      if (bytes > file.bytes) throw changed();
      crc = checksums.crc32(block, crc);
      sha256.update(block);
      yield block;
    }
    if (bytes !== file.bytes || crc !== file.crc32) throw changed();
    digest = sha256.digestHex();
    hashed(digest);
  } finally {
    // A hasher that is used again has to be closed, also when the zip is given up here.
    if (digest === null) sha256.digestHex();
    await source.close();
  }
}
