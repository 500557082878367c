import type { ByteSource } from '../bytes/byte-source.ts';
import type { WaveReading } from '../wave/track-format.ts';
import type { Measures } from './measures.ts';
import type { MeterEngine } from './meter.ts';
import type { Overview } from './overview.ts';

export type TrackReading = Extract<WaveReading, { kind: 'track' }>;

export type MeasureOptions = {
  /** Stops the work between two blocks: the promise is rejected with the signal's reason. */
  signal?: AbortSignal;
  /** Told how many more bytes were read, after every block. */
  onBytes?: (bytes: number) => void;
};

/**
 * Measures one file in one read from its first byte to its last.
 *
 * A file that is written to meanwhile streams on without an error, ends too early or fails
 * late. So the bytes are counted and one byte is read again afterwards; what was measured is
 * kept and `changedWhileRead` says that it is not to be trusted.
 * Throws AppError `no-access` when the file cannot be read at all.
 */
export async function measureTrack(
  source: ByteSource,
  reading: TrackReading,
  engine: MeterEngine,
  { signal, onBytes }: MeasureOptions = {},
): Promise<{ measures: Measures; overview: Overview }> {
  const meter = engine.open(reading.format, reading.layout);
  let fileBytes = 0;
  for await (const block of source.stream(0, signal)) {
    signal?.throwIfAborted();
    meter.write(block);
    fileBytes += block.length;
    onBytes?.(block.length);
  }
  signal?.throwIfAborted();
  const changedWhileRead = fileBytes !== source.size || !(await hasSize(source));
  const { measures, overview } = meter.finish();
  return { measures: { ...measures, fileBytes, changedWhileRead }, overview };
}

/** Whether the last byte is still there and none has come behind it. */
async function hasSize(source: ByteSource): Promise<boolean> {
  if (source.size === 0) return true;
  try {
    return (await source.read(source.size - 1, 2)).length === 1;
  } catch {
    return false;
  }
}
