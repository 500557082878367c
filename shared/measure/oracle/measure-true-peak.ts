/**
 * True peak by four times oversampling (ITU-R BS.1770-5, Annex 2: the interpolating filter of
 * order 48 in four phases). The samples themselves lie on the same curve and count as well; in
 * front of the file there is silence.
 */
export function measureTruePeak(samples: Float64Array): number {
  const taps = interpolationPhases[0].length;
  const padded = new Float64Array(taps - 1 + samples.length);
  padded.set(samples, taps - 1);
  let peak = 0;
  for (let i = taps - 1; i < padded.length; i++) {
    peak = Math.max(peak, Math.abs(padded[i]!));
    for (const phase of interpolationPhases) {
      let value = 0;
      for (let tap = 0; tap < taps; tap++) value += phase[tap]! * padded[i - tap]!;
      peak = Math.max(peak, Math.abs(value));
    }
  }
  return peak;
}

const phase0 = [
  0.001708984375, 0.010986328125, -0.0196533203125, 0.033203125, -0.0594482421875, 0.1373291015625,
  0.97216796875, -0.102294921875, 0.047607421875, -0.026611328125, 0.014892578125, -0.00830078125,
];
const phase1 = [
  -0.0291748046875, 0.029296875, -0.0517578125, 0.089111328125, -0.16650390625, 0.465087890625,
  0.77978515625, -0.2003173828125, 0.1015625, -0.0582275390625, 0.0330810546875, -0.0189208984375,
];

/** The table of Annex 2: its third and fourth phases are the second and first backwards. */
const interpolationPhases = [phase0, phase1, phase1.toReversed(), phase0.toReversed()] as const;
