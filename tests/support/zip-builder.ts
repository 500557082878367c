import { deflateRawSync } from 'node:zlib';

/**
 * Builds zips by hand, byte by byte, for what no packing program writes: names that lead out of
 * the folder, sizes that lie, entries that share bytes. Layout as in APPNOTE 4.3.
 */
export type TestEntry = {
  name: string | Uint8Array;
  bytes: Uint8Array;
  deflate?: boolean;
  flags?: number;
  method?: number;
  /** st_mode as Unix has it; makes the entry one from Unix. */
  unixMode?: number;
  extra?: Uint8Array;
  /** Lies in the central directory. */
  central?: { packedBytes?: number; unpackedBytes?: number; localOffset?: number };
  /** Lies in the local header. */
  local?: { name?: string; method?: number; signature?: number };
};

function field(bytes: 2 | 4 | 8, value: number): Buffer {
  const buffer = Buffer.alloc(bytes);
  if (bytes === 8) buffer.writeBigUInt64LE(BigInt(value));
  else buffer.writeUIntLE(value, 0, bytes);
  return buffer;
}

export function buildZip(
  entries: readonly TestEntry[],
  options: {
    zip64?: boolean;
    comment?: string;
    entryCount?: number;
    directoryOffset?: number;
  } = {},
): Buffer {
  const locals: Buffer[] = [];
  const centrals: Buffer[] = [];
  let offset = 0;
  for (const entry of entries) {
    const name = typeof entry.name === 'string' ? Buffer.from(entry.name) : Buffer.from(entry.name);
    const packed = entry.deflate ? deflateRawSync(entry.bytes) : Buffer.from(entry.bytes);
    const method = entry.method ?? (entry.deflate ? 8 : 0);
    const crc = crc32(entry.bytes);
    const extra = Buffer.from(entry.extra ?? []);
    const common = (packedBytes: number, unpackedBytes: number, localMethod: number) => [
      field(2, 20),
      field(2, entry.flags ?? 0),
      field(2, localMethod),
      field(4, 0x00210000),
      field(4, crc),
      field(4, packedBytes),
      field(4, unpackedBytes),
    ];
    const localName = entry.local?.name === undefined ? name : Buffer.from(entry.local.name);
    const local = Buffer.concat([
      field(4, entry.local?.signature ?? 0x04034b50),
      ...common(packed.length, entry.bytes.length, entry.local?.method ?? method),
      field(2, localName.length),
      field(2, 0),
      localName,
      packed,
    ]);
    const packedBytes = entry.central?.packedBytes ?? packed.length;
    const unpackedBytes = entry.central?.unpackedBytes ?? entry.bytes.length;
    const localOffset = entry.central?.localOffset ?? offset;
    const wide = options.zip64
      ? Buffer.concat([
          field(2, 1),
          field(2, 24),
          field(8, unpackedBytes),
          field(8, packedBytes),
          field(8, localOffset),
        ])
      : Buffer.alloc(0);
    const narrow = (value: number) => (options.zip64 ? 0xffffffff : value);
    centrals.push(
      Buffer.concat([
        field(4, 0x02014b50),
        field(2, entry.unixMode === undefined ? 20 : 0x0314),
        ...common(narrow(packedBytes), narrow(unpackedBytes), method),
        field(2, name.length),
        field(2, extra.length + wide.length),
        field(2, 0),
        field(2, 0),
        field(2, 0),
        field(4, (entry.unixMode ?? 0) * 65536),
        field(4, narrow(localOffset)),
        name,
        extra,
        wide,
      ]),
    );
    locals.push(local);
    offset += local.length;
  }
  const directory = Buffer.concat(centrals);
  const count = options.entryCount ?? entries.length;
  const directoryOffset = options.directoryOffset ?? offset;
  const zip64End = options.zip64
    ? Buffer.concat([
        field(4, 0x06064b50),
        field(8, 44),
        field(2, 45),
        field(2, 45),
        field(4, 0),
        field(4, 0),
        field(8, count),
        field(8, count),
        field(8, directory.length),
        field(8, directoryOffset),
        field(4, 0x07064b50),
        field(4, 0),
        field(8, offset + directory.length),
        field(4, 1),
      ])
    : Buffer.alloc(0);
  const comment = Buffer.from(options.comment ?? '');
  const end = Buffer.concat([
    field(4, 0x06054b50),
    field(2, 0),
    field(2, 0),
    field(2, options.zip64 ? 0xffff : count),
    field(2, options.zip64 ? 0xffff : count),
    field(4, options.zip64 ? 0xffffffff : directory.length),
    field(4, options.zip64 ? 0xffffffff : directoryOffset),
    field(2, comment.length),
    comment,
  ]);
  return Buffer.concat([...locals, directory, zip64End, end]);
}

/** Bit by bit (Node.js has one only from 20.15 on). */
function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let i = 0; i < 8; i++) crc = (crc >>> 1) ^ (crc & 1 ? 0xedb88320 : 0);
  }
  return (crc ^ 0xffffffff) >>> 0;
}
