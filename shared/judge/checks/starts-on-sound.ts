import { found, type TrackCheck } from '../check.ts';
import { highest, onlyChannel } from '../track-measures.ts';

/** The first millisecond is loud and does not rise from zero: a click, or a start cut off. */
export const startsOnSound: TrackCheck = ({ measures, format }, { rules }) => {
  const hit = measures.channels.flatMap(({ startEdge: edge }, index) =>
    edge.peakDbfs !== null && edge.peakDbfs > rules.signal.edgeDbfs && !edge.ramps
      ? [{ edge, index }]
      : [],
  );
  if (hit.length === 0) return null;
  const millisecond = Math.min(measures.frames, Math.ceil(format.sampleRateHz / 1000));
  return found(
    'starts-on-sound',
    { peakDbfs: highest(hit.map(({ edge }) => edge.peakDbfs)) ?? 0 },
    {
      ...onlyChannel(hit.map(({ index }) => index)),
      places: 1,
      ranges: [{ startFrame: 0, endFrame: millisecond, confidence: 'sure' }],
    },
  );
};
