/**
 * K-weighting (ITU-R BS.1770-5, Annex 1) at any sample rate. The standard prints coefficients for
 * 48 kHz only; these analogue prototypes give them back to 14 digits at 48 kHz and move them to
 * other rates by the bilinear transform, as loudness meters commonly do.
 */

/** Second-order section with a0 = 1: y = b0 x + b1 x' + b2 x'' - a1 y' - a2 y''. */
export type Biquad = { b0: number; b1: number; b2: number; a1: number; a2: number };

/** The head's effect on sound from the front. */
const shelf = {
  frequencyHz: 1681.974450955533,
  gainDb: 3.999843853973347,
  q: 0.7071752369554196,
  /** Exponent of the gain at the shelf's middle. */
  middle: 0.4996667741545416,
};

/** The ear's insensitivity to low frequencies ("revised low-frequency B-curve"). */
const highPass = { frequencyHz: 38.13547087602444, q: 0.5003270373238773 };

/** Both stages, to be run one after the other. */
export function kWeighting(sampleRateHz: number): readonly [Biquad, Biquad] {
  return [shelfStage(sampleRateHz), highPassStage(sampleRateHz)];
}

function shelfStage(sampleRateHz: number): Biquad {
  const k = Math.tan((Math.PI * shelf.frequencyHz) / sampleRateHz);
  const high = 10 ** (shelf.gainDb / 20);
  const middle = high ** shelf.middle;
  const a0 = 1 + k / shelf.q + k * k;
  return {
    b0: (high + (middle * k) / shelf.q + k * k) / a0,
    b1: (2 * (k * k - high)) / a0,
    b2: (high - (middle * k) / shelf.q + k * k) / a0,
    a1: (2 * (k * k - 1)) / a0,
    a2: (1 - k / shelf.q + k * k) / a0,
  };
}

function highPassStage(sampleRateHz: number): Biquad {
  const k = Math.tan((Math.PI * highPass.frequencyHz) / sampleRateHz);
  const a0 = 1 + k / highPass.q + k * k;
  return {
    b0: 1,
    b1: -2,
    b2: 1,
    a1: (2 * (k * k - 1)) / a0,
    a2: (1 - k / highPass.q + k * k) / a0,
  };
}
