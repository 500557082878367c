import type { Measures } from '../measure/measures.ts';
import type { Overview } from '../measure/overview.ts';
import type { WaveReading } from '../wave/track-format.ts';

/**
 * What reading and measuring one file gave: everything the later stages know about it. Plain
 * data, so it crosses from a worker as it is.
 */
export type MeasuredFile = {
  path: string;
  bytes: number;
  reading: WaveReading;
  /** null for what is not measured (other audio, notes, unreadable). */
  measures: Measures | null;
  /** For drawing; null as above. */
  overview: Overview | null;
};

/** By path, by code units, so that no language setting changes anything. */
export function inPathOrder(files: readonly MeasuredFile[]): MeasuredFile[] {
  return [...files].sort((a, b) => (a.path < b.path ? -1 : a.path > b.path ? 1 : 0));
}
