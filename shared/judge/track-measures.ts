import type { PairMeasures } from '../measure/measures.ts';
import type { CheckedTrack } from './check.ts';

/** Highest sample peak of all channels, dBFS; null if all are silent. */
export function peakOf({ measures }: CheckedTrack): number | null {
  return highest(measures.channels.map((channel) => channel.peakDbfs));
}

/** The highest of some levels; null if none of them is there. */
export function highest(levels: readonly (number | null)[]): number | null {
  const there = levels.filter((level) => level !== null);
  return there.length > 0 ? Math.max(...there) : null;
}

/** Left against right of a two-channel file; null for any other. */
export function stereoPair({ format, measures }: CheckedTrack): PairMeasures | null {
  return format.channels === 2 ? (measures.pairs[0] ?? null) : null;
}

/** The channel a finding is about: the only one of those given, or none in particular. */
export function onlyChannel(channels: readonly number[]): { channel?: number } {
  const [first] = channels;
  return channels.length === 1 && first !== undefined ? { channel: first } : {};
}
