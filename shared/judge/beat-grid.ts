import type { FrameRange } from '../measure/measures.ts';
import type { CheckedSession, CheckedTrack } from './check.ts';

/** Thirty-second notes and their triplets: what stutters and stops are cut to. */
const stepsPerBeat = [8, 12];
const toleranceSeconds = 0.002;

/**
 * Whether a place begins and ends with the beat, as a cut made on purpose does. Only a fixed tempo
 * can tell; the files begin on a beat.
 */
export function isOnTheBeat(
  { startFrame, endFrame }: FrameRange,
  { format }: CheckedTrack,
  { information }: CheckedSession,
): boolean {
  const { tempo } = information;
  if (tempo?.kind !== 'fixed') return false;
  return stepsPerBeat.some((steps) => {
    const stepSeconds = 60 / tempo.bpm / steps;
    return [startFrame, endFrame].every((frame) => {
      const seconds = frame / format.sampleRateHz;
      const off = Math.abs(seconds - Math.round(seconds / stepSeconds) * stepSeconds);
      return off <= toleranceSeconds;
    });
  });
}
