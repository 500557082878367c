import { sameLength } from '../../compare/starts.ts';
import { speedRatio } from '../../compare/speed.ts';
import type { Level } from '../../findings/finding.ts';
import { found, type CheckedTrack, type TrackCheck } from '../check.ts';
import { isReturnOrEffect } from '../part-kinds.ts';

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
      fitsAtEnd: start.fitsAtEnd,
    },
    {
      level: levelOf(track, differenceFrames),
      repairs: startProven && differenceFrames < 0 ? ['add-silence'] : [],
    },
  );
};

/** A return that rings on after everything else is longer by its nature. */
function levelOf({ start, name }: CheckedTrack, differenceFrames: number): Level {
  if (start.proof !== null) return 'note';
  if (start.shiftFrames !== null) return 'must-fix';
  return differenceFrames > 0 && isReturnOrEffect(name) ? 'note' : 'look';
}
