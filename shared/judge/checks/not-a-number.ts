import { joinPlaces } from '../../findings/finding-places.ts';
import { found, type TrackCheck } from '../check.ts';
import { onlyChannel } from '../track-measures.ts';

/** Samples that are no number at all. One of them can silence a whole mix bus. */
export const notANumber: TrackCheck = ({ measures, format }) => {
  const hit = measures.channels.flatMap(({ notANumber }, index) =>
    notANumber.count > 0 ? [{ ...notANumber, index }] : [],
  );
  if (hit.length === 0) return null;
  const places = joinPlaces(hit);
  return found(
    'not-a-number',
    {
      samples: hit.reduce((sum, { count }) => sum + count, 0),
      firstSeconds: (places.ranges[0]?.startFrame ?? 0) / format.sampleRateHz,
    },
    { ...onlyChannel(hit.map(({ index }) => index)), ...places },
  );
};
