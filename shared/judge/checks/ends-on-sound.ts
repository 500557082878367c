import { soundingEnds } from '../borders.ts';
import { found, type TrackCheck } from '../check.ts';
import { highest, onlyChannel } from '../track-measures.ts';

/** The last sample is far from zero and nothing falls to it: a click, or an end cut off. */
export const endsOnSound: TrackCheck = (track, session) => {
  const hit = soundingEnds(track, session.rules.signal);
  if (hit.length === 0) return null;
  const { frames } = track.measures;
  const startFrame = Math.max(0, frames - Math.ceil(track.format.sampleRateHz / 1000));
  return found(
    'ends-on-sound',
    { peakDbfs: highest(hit.map(({ peakDbfs }) => peakDbfs)) ?? 0 },
    {
      ...(session.cutFromLongerRecording ? { level: 'note' } : {}),
      ...onlyChannel(hit.map(({ channel }) => channel)),
      places: 1,
      ranges: [{ startFrame, endFrame: frames, confidence: 'sure' }],
    },
  );
};
