import { found, type TrackCheck } from '../check.ts';
import { peakOf, stereoPair } from '../track-measures.ts';

/** Both sides are the same sound: a mono part in a stereo file. */
export const dualMono: TrackCheck = (track, { rules }) => {
  const pair = stereoPair(track);
  if (!pair || (peakOf(track) ?? -Infinity) <= rules.signal.silentDbfs) return null;
  const { identical, sideUnderMidDb, gainDb } = pair;
  const far = identical ? Infinity : (sideUnderMidDb ?? -Infinity);
  if (far < rules.signal.nearlyDualMonoDb) return null;
  const nearly = far < rules.signal.dualMonoDb;
  return found(
    'dual-mono',
    { identical, sideUnderMidDb: identical ? null : sideUnderMidDb, gainDb: gainDb ?? 0, nearly },
    nearly ? { level: 'note', repairs: [] } : {},
  );
};
