import { found, type TrackCheck } from '../check.ts';
import { onlyChannel } from '../track-measures.ts';

/** The wave lies beside the middle line as long as it sounds. */
export const dcOffset: TrackCheck = ({ measures }, { rules }) => {
  const hit = measures.channels.flatMap(({ soundingDcOffset }, index) =>
    Math.abs(soundingDcOffset) > rules.signal.dcOffset ? [{ soundingDcOffset, index }] : [],
  );
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
