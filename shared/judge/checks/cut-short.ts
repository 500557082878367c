import { found, type ReadingCheck } from '../check.ts';

/** The header promises more than is there: an interrupted copy or export. */
export const cutShort: ReadingCheck = ({ reading, format }) => {
  const promised = reading.kind === 'track' ? reading.promisedFrames : null;
  if (promised === null || promised <= format.frames) return null;
  const missingFrames = promised - format.frames;
  return found('cut-short', {
    promisedSeconds: promised / format.sampleRateHz,
    missingSeconds: missingFrames / format.sampleRateHz,
    missingFrames,
  });
};
