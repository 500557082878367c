import type { ChannelMeasures } from '../measure/measures.ts';
import type { Thresholds } from '../rules/thresholds.ts';
import type { CheckedTrack } from './check.ts';
import { clippingClass } from './clipping-class.ts';

/** Enough runs or samples to be more than chance, and not flat by design. */
export function isClipped(
  channel: ChannelMeasures,
  track: CheckedTrack,
  rules: Thresholds,
): boolean {
  return hasFlatRuns(channel, rules) && !isFlatByDesign(channel, track, rules);
}

/**
 * So many flat tops a second, in so large a share of the cycles, are no overload but a sound, of
 * parts that are distorted at times.
 */
const denseRunsPerSecond = 50;
const denseFlatShare = 0.3;

/**
 * Nearly every cycle ends flat; or, where distortion is often wanted and nothing hits full scale,
 * so many of them that a fuzz or a clipper must have made them.
 */
function isFlatByDesign(
  { clipping, clippedRuns }: ChannelMeasures,
  { name, measures, format }: CheckedTrack,
  rules: Thresholds,
): boolean {
  if (clipping.flatCycleShare >= rules.flatTopsShare) return true;
  const seconds = measures.frames / format.sampleRateHz;
  const kind = clippingClass(name);
  return (
    (kind === 'often-wanted' || kind === 'came-so') &&
    clipping.flatCycleShare >= denseFlatShare &&
    clipping.fullScaleRuns === 0 &&
    clippedRuns >= denseRunsPerSecond * seconds
  );
}

export function hasFlatRuns(
  { clipping, clippedRuns }: Pick<ChannelMeasures, 'clipping' | 'clippedRuns'>,
  rules: Thresholds,
): boolean {
  return (
    clippedRuns >= rules.clippedRuns ||
    clipping.samples >= rules.clippedSamples ||
    clipping.fullScaleRuns > 0
  );
}
