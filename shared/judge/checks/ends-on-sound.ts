import { found, type TrackCheck } from '../check.ts';
import { highest, onlyChannel } from '../track-measures.ts';

/** The last millisecond is loud and does not fall to zero: a click, or an end cut off. */
export const endsOnSound: TrackCheck = ({ measures, format }, { rules }) => {
  const hit = measures.channels.flatMap(({ endEdge: edge }, index) =>
    edge.peakDbfs !== null && edge.peakDbfs > rules.signal.edgeDbfs && !edge.ramps
      ? [{ edge, index }]
      : [],
  );
  if (hit.length === 0) return null;
  const { frames } = measures;
  const startFrame = Math.max(0, frames - Math.ceil(format.sampleRateHz / 1000));
  return found(
    'ends-on-sound',
    { peakDbfs: highest(hit.map(({ edge }) => edge.peakDbfs)) ?? 0 },
    {
      ...onlyChannel(hit.map(({ index }) => index)),
      places: 1,
      ranges: [{ startFrame, endFrame: frames, confidence: 'sure' }],
    },
  );
};
