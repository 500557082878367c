import { sameLength } from '../../compare/starts.ts';
import { found, type TrackCheck } from '../check.ts';

/**
 * Its time stamp is not the one most tracks carry. A file of full length with another stamp was
 * most likely stamped when it was recorded: the stamp is stale, the start is right.
 */
export const startDiffers: TrackCheck = ({ format, start }, session) => {
  const { stampDifferenceFrames } = start;
  const { sampleRateHz } = session.format;
  if (!stampDifferenceFrames || sampleRateHz === null || format.timeReferenceFrames === null)
    return null;
  const likelyStale = sameLength(
    format,
    session.format,
    session.rules.startAndLength.lengthToleranceFrames,
  );
  const differenceSeconds = stampDifferenceFrames / sampleRateHz;
  return found(
    'start-differs',
    {
      differenceSeconds,
      differenceFrames: stampDifferenceFrames,
      timeReferenceFrames: format.timeReferenceFrames,
      sessionTimeReferenceFrames:
        format.timeReferenceFrames - Math.round(differenceSeconds * format.sampleRateHz),
      likelyStale,
    },
    likelyStale ? { level: 'note', repairs: [] } : {},
  );
};
