import { open } from 'node:fs/promises';

/** A mono WAV file (24 bits at 48 kHz) of silence that takes no room on the disk, however long. */
export async function writeSparseWave(path: string, dataBytes: number): Promise<void> {
  const header = Buffer.alloc(44);
  header.write('RIFF', 0, 'latin1');
  header.writeUInt32LE(36 + dataBytes, 4);
  header.write('WAVEfmt ', 8, 'latin1');
  header.writeUInt32LE(16, 16);
  header.writeUInt16LE(1, 20);
  header.writeUInt16LE(1, 22);
  header.writeUInt32LE(48_000, 24);
  header.writeUInt32LE(144_000, 28);
  header.writeUInt16LE(3, 32);
  header.writeUInt16LE(24, 34);
  header.write('data', 36, 'latin1');
  header.writeUInt32LE(dataBytes, 40);
  const file = await open(path, 'w');
  try {
    await file.write(header);
    await file.truncate(header.length + dataBytes);
  } finally {
    await file.close();
  }
}
