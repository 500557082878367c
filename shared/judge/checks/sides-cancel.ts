import { found, type TrackCheck } from '../check.ts';
import { stereoPair } from '../track-measures.ts';

/**
 * Right is left upside down: in mono nothing is left of it. The side signal of a mid/side pair is
 * just that when it is written as stereo.
 */
export const sidesCancel: TrackCheck = (track, { rules }) => {
  const pair = stereoPair(track);
  if (!pair || pair.correlation === null || pair.correlation >= 0) return null;
  const far = pair.midUnderSideDb ?? Infinity;
  if (far < rules.signal.sidesCancelDb) return null;
  return found(
    'sides-cancel',
    { midUnderSideDb: pair.midUnderSideDb },
    track.name.side === 'S' ? { level: 'note' } : {},
  );
};
