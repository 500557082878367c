import { found, type TrackCheck } from '../check.ts';

/** Not the rate of the session. Played as it is, such a file runs too fast or too slow. */
export const sampleRateDiffers: TrackCheck = ({ format }, session) => {
  const { sampleRateHz, sampleRateEvenlySplit } = session.format;
  if (sampleRateHz === null || format.sampleRateHz === sampleRateHz) return null;
  return found('sample-rate-differs', {
    sampleRateHz: format.sampleRateHz,
    sessionSampleRateHz: sampleRateHz,
    evenlySplit: sampleRateEvenlySplit,
  });
};
