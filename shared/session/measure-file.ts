import type { ByteSource, DroppedFile } from '../bytes/byte-source.ts';
import type { ZippedFile } from '../bytes/zip-source.ts';
import { AppError } from '../errors.ts';
import { measureTrack } from '../measure/measure-track.ts';
import type { MeterEngine } from '../measure/meter.ts';
import { readWave } from '../wave/read-wave.ts';
import type { MeasuredFile } from './measured-file.ts';

export type MeasureFileOptions = {
  signal?: AbortSignal | undefined;
  /** Told how many more bytes were read, after every block. */
  onBytes?: ((bytes: number) => void) | undefined;
};

/**
 * Measures one dropped file, wherever that is done (in a worker, on the command line). A file
 * that cannot be opened or read is `unreadable` with the reason `could-not-be-read`: it never
 * stops the others.
 */
export type MeasureFile = (file: DroppedFile, options: MeasureFileOptions) => Promise<MeasuredFile>;

/** Reads and measures files in this thread, one at a time. */
export function measureHere(engine: MeterEngine): MeasureFile {
  return async (file, options) => {
    try {
      const source = await file.open();
      try {
        const measured = await measureSource(file.path, source, engine, options);
        return isDamaged(measured, file) ? unmeasured(file.path, file.size, notReadable) : measured;
      } finally {
        await source.close();
      }
    } catch (error) {
      if (error instanceof AppError && ['no-access', 'zip-refused'].includes(error.code)) {
        return unmeasured(file.path, file.size, notReadable);
      }
      throw error;
    }
  };
}

const notReadable = { kind: 'unreadable', reason: 'could-not-be-read', byteOffset: 0 } as const;

/** A zip says which CRC its files have; another one means that the zip is damaged there. */
function isDamaged({ measures }: MeasuredFile, file: DroppedFile | ZippedFile): boolean {
  return 'crc32' in file && measures !== null && parseInt(measures.crc32, 16) !== file.crc32;
}

/** Reads and measures bytes from wherever they come. Throws AppError `no-access`. */
export async function measureSource(
  path: string,
  source: ByteSource,
  engine: MeterEngine,
  { signal, onBytes }: MeasureFileOptions,
): Promise<MeasuredFile> {
  const reading = await readWave(source, path);
  if (reading.kind !== 'track') return unmeasured(path, source.size, reading);
  const { measures, overview } = await measureTrack(source, reading, engine, {
    ...(signal && { signal }),
    ...(onBytes && { onBytes }),
  });
  return { path, bytes: source.size, reading, measures, overview };
}

function unmeasured(path: string, bytes: number, reading: MeasuredFile['reading']): MeasuredFile {
  return { path, bytes, reading, measures: null, overview: null };
}
