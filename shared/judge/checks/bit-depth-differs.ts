import { found, type TrackCheck } from '../check.ts';

/** Another depth than most tracks have: harmless in itself, but a hint at another export. */
export const bitDepthDiffers: TrackCheck = ({ format }, session) => {
  const { bits, encoding } = session.format;
  if (bits === null || encoding === null) return null;
  if (format.bits === bits && format.encoding === encoding) return null;
  return found('bit-depth-differs', {
    bits: format.bits,
    encoding: format.encoding,
    sessionBits: bits,
    sessionEncoding: encoding,
  });
};
