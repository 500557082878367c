import { found, type TrackCheck } from '../check.ts';
import { stereoPair } from '../track-measures.ts';

/** Right is left upside down: in mono nothing is left of it. */
export const sidesCancel: TrackCheck = (track, { rules }) => {
  const pair = stereoPair(track);
  if (!pair || pair.correlation === null || pair.correlation >= 0) return null;
  const far = pair.midUnderSideDb ?? Infinity;
  return far >= rules.signal.sidesCancelDb
    ? found('sides-cancel', { midUnderSideDb: pair.midUnderSideDb })
    : null;
};
