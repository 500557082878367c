import { found, type TrackCheck } from '../check.ts';

/** Fewer bits than the rules ask for. */
export const bitDepthLow: TrackCheck = ({ format }, { rules }) =>
  format.bits < rules.format.minimumBits
    ? found('bit-depth-low', { bits: format.bits, minimumBits: rules.format.minimumBits })
    : null;
