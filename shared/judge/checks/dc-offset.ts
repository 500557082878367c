import { found, type TrackCheck } from '../check.ts';
import { onlyChannel } from '../track-measures.ts';

/** A single hit is hardly ever even about the middle line, and has no steady one. */
const shortestSeconds = 1;

/** The wave lies beside the middle line as long as it sounds. */
export const dcOffset: TrackCheck = ({ measures, format }, { rules }) => {
  const fileSeconds = measures.frames / format.sampleRateHz;
  const hit = measures.channels.flatMap(({ soundingDcOffset, dcOffset: fileMean }, index) => {
    if (Math.abs(soundingDcOffset) <= rules.signal.dcOffset) return [];
    // Silence adds nothing to the sum, so both means tell how long it sounds.
    const soundingSeconds = Math.abs(fileMean / soundingDcOffset) * fileSeconds;
    return soundingSeconds >= shortestSeconds ? [{ soundingDcOffset, index }] : [];
  });
  const [worst] = [...hit].sort(
    (a, b) => Math.abs(b.soundingDcOffset) - Math.abs(a.soundingDcOffset),
  );
  if (!worst) return null;
  return found(
    'dc-offset',
    { offsetPercent: worst.soundingDcOffset * 100 },
    onlyChannel(hit.map(({ index }) => index)),
  );
};
