import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';
import type { Measures } from './measures.ts';
import type { Overview } from './overview.ts';

/** What the meters say about a file, but for what only the reader of the bytes knows. */
export type MeterResult = {
  measures: Omit<Measures, 'fileBytes' | 'changedWhileRead'>;
  overview: Overview;
};

/**
 * All meters of one file. Bytes go in once, in order, from the first byte of the file to the
 * last, in blocks of any size: how they are cut must not change a single bit of the result.
 * CRC-32 runs over all of them, everything else over the sample data.
 */
export type TrackMeter = {
  write(bytes: Uint8Array): void;
  finish(): MeterResult;
};

/**
 * Two engines measure the same things: `wasm` is what runs, `oracle` is plain TypeScript that a
 * reader can follow and that tests hold against it. Only adapters load the WebAssembly bytes.
 */
export type MeterEngine = {
  readonly name: 'wasm' | 'oracle';
  /** One meter at a time an engine; a new one may be opened after finish() or when abandoned. */
  open(format: TrackFormat, layout: WaveLayout): TrackMeter;
};
