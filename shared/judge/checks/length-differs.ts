import { sameLength } from '../../compare/starts.ts';
import { speedRatio } from '../../compare/speed.ts';
import { found, type TrackCheck } from '../check.ts';

/**
 * Not as long as the session. Where the start is proven only the end differs, which silence
 * mends; where something shows that the start was cut, the file lies at the wrong place. Of loose
 * clips not-consolidated says all there is to say.
 */
export const lengthDiffers: TrackCheck = (track, session) => {
  const { format, start, framesAtSessionRate } = track;
  const { frames, sampleRateHz } = session.format;
  if (frames === null || sampleRateHz === null || session.looseClips) return null;
  if (sameLength(format, session.format, session.rules.startAndLength.lengthToleranceFrames))
    return null;
  if (speedRatio(framesAtSessionRate, session.format, session.tracks.length) !== null) return null;
  const differenceFrames = framesAtSessionRate - frames;
  const startProven = start.proof !== null;
  return found(
    'length-differs',
    {
      lengthSeconds: format.frames / format.sampleRateHz,
      sessionLengthSeconds: frames / sampleRateHz,
      differenceFrames,
      differenceSeconds: differenceFrames / sampleRateHz,
      startProven,
      shiftSeconds: start.shiftFrames === null ? null : start.shiftFrames / sampleRateHz,
      soundsAtOnce: start.soundsAtOnce,
    },
    {
      level: startProven ? 'note' : start.shiftFrames === null ? 'look' : 'must-fix',
      repairs: startProven && differenceFrames < 0 ? ['add-silence'] : [],
    },
  );
};
