import type { Thresholds } from '../rules/thresholds.ts';
import type { CheckedTrack } from './check.ts';

type Measured = Pick<CheckedTrack, 'measures'>;

/** Channels whose first sample is far from zero already, and what the first millisecond peaks at. */
export function soundingStarts({ measures }: Measured, { edgeDbfs }: Thresholds): Border[] {
  return measures.channels.flatMap(({ startEdge, firstSoundFrame }, channel) =>
    firstSoundFrame === 0 && isCut(startEdge, edgeDbfs)
      ? [{ channel, peakDbfs: startEdge.peakDbfs ?? 0 }]
      : [],
  );
}

/** Channels whose last sample is still far from zero. */
export function soundingEnds({ measures }: Measured, { edgeDbfs }: Thresholds): Border[] {
  return measures.channels.flatMap(({ endEdge, lastSoundFrame }, channel) =>
    lastSoundFrame === measures.frames - 1 && isCut(endEdge, edgeDbfs)
      ? [{ channel, peakDbfs: endEdge.peakDbfs ?? 0 }]
      : [],
  );
}

export type Border = { channel: number; peakDbfs: number };

function isCut(edge: { peakDbfs: number | null; ramps: boolean }, edgeDbfs: number): boolean {
  return edge.peakDbfs !== null && edge.peakDbfs > edgeDbfs && !edge.ramps;
}

/**
 * A recording cut into songs: sound runs through both borders of at least three tracks and a
 * fifth of all. What is cut there was cut for all tracks at once, on purpose.
 */
export function isCutFromLongerRecording(tracks: readonly Measured[], rules: Thresholds): boolean {
  const running = tracks.filter(
    (track) => soundingStarts(track, rules).length > 0 && soundingEnds(track, rules).length > 0,
  ).length;
  return running >= 3 && running * 5 >= tracks.length;
}
