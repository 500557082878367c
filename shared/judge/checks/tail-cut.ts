import { found, type TrackCheck } from '../check.ts';

/** A sound whose last millisecond is this far under the limit has died away or was faded out. */
const diedAwayDb = 15;

/** The file ends while something still rings well above its own floor. */
export const tailCut: TrackCheck = ({ measures }, { rules, cutFromLongerRecording }) => {
  const { tailDbfs, tailAboveFloorDb } = rules.signal;
  const ringing = measures.channels.filter(
    ({ tailPeakDbfs, floorDbfs, endEdge }) =>
      tailPeakDbfs !== null &&
      (endEdge.peakDbfs ?? -Infinity) > tailDbfs - diedAwayDb &&
      tailPeakDbfs > tailDbfs &&
      tailPeakDbfs > (floorDbfs ?? -Infinity) + tailAboveFloorDb,
  );
  const [loudest] = ringing.sort((a, b) => (b.tailPeakDbfs ?? 0) - (a.tailPeakDbfs ?? 0));
  if (!loudest || loudest.tailPeakDbfs === null) return null;
  const startFrame = Math.max(0, measures.frames - 1);
  return found(
    'tail-cut',
    { tailPeakDbfs: loudest.tailPeakDbfs, floorDbfs: loudest.floorDbfs },
    {
      ...(cutFromLongerRecording ? { level: 'note' } : {}),
      places: 1,
      ranges: [{ startFrame, endFrame: measures.frames, confidence: 'sure' }],
    },
  );
};
