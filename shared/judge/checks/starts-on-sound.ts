import { soundingStarts } from '../borders.ts';
import { found, type TrackCheck } from '../check.ts';
import { highest, onlyChannel } from '../track-measures.ts';

/** The first sample is far from zero and nothing rises to it: a click, or a start cut off. */
export const startsOnSound: TrackCheck = (track, session) => {
  const hit = soundingStarts(track, session.rules.signal);
  if (hit.length === 0) return null;
  const millisecond = Math.ceil(track.format.sampleRateHz / 1000);
  return found(
    'starts-on-sound',
    { peakDbfs: highest(hit.map(({ peakDbfs }) => peakDbfs)) ?? 0 },
    {
      ...(session.cutFromLongerRecording ? { level: 'note' } : {}),
      ...onlyChannel(hit.map(({ channel }) => channel)),
      places: 1,
      ranges: [
        {
          startFrame: 0,
          endFrame: Math.min(track.measures.frames, millisecond),
          confidence: 'sure',
        },
      ],
    },
  );
};
