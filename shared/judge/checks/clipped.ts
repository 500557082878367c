import { joinPlaces } from '../../findings/finding-places.ts';
import type { ChannelMeasures } from '../../measure/measures.ts';
import type { Thresholds } from '../../rules/thresholds.ts';
import type { Level } from '../../findings/finding.ts';
import { found, type CheckedTrack, type TrackCheck } from '../check.ts';
import { clippingClass, type ClippingClass } from '../clipping-class.ts';
import { highest, onlyChannel } from '../track-measures.ts';

/** Runs of samples at a ceiling, whether full scale or one that was turned down afterwards. */
export const clipped: TrackCheck = (track, { rules }) => {
  const { channels } = track.measures;
  const hit = channels.flatMap((channel, index) =>
    isClipped(channel, track, rules.signal) ? [{ channel, index }] : [],
  );
  if (hit.length === 0) return null;
  const runs = hit.reduce((sum, { channel }) => sum + channel.clippedRuns, 0);
  const longestRunFrames = Math.max(...hit.map(({ channel }) => channel.clipping.longestRunFrames));
  const longestRunMs = (longestRunFrames / track.format.sampleRateHz) * 1000;
  const atFullScale = hit.some(({ channel }) => channel.clipping.fullScaleRuns > 0);
  const serious =
    runs > rules.signal.clippedSeriousRuns || longestRunMs >= rules.signal.clippedSeriousMs;
  return found(
    'clipped',
    {
      runs,
      longestRunFrames,
      longestRunMs,
      ceilingDbfs: highest(hit.map(({ channel }) => channel.clipping.ceilingDbfs)) ?? 0,
      atFullScale,
    },
    {
      level: levelOf(clippingClass(track.name), serious, atFullScale),
      ...onlyChannel(hit.map(({ index }) => index)),
      ...joinPlaces(
        hit.map(({ channel }) => ({
          count: channel.clippedRuns,
          ranges: channel.clipping.ranges,
        })),
      ),
    },
  );
};

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

/**
 * Voices, acoustic instruments, keys and clean signals never gain by it: must fix. Drums, amps
 * and synthesisers are clipped on purpose often enough, below full scale mostly by a clipper that
 * belongs to the sound: look; at full scale and in number it is a fault there too.
 */
function levelOf(kind: ClippingClass, serious: boolean, atFullScale: boolean): Level {
  switch (kind) {
    case 'never-wanted':
      return 'must-fix';
    case 'often-wanted':
      return serious && atFullScale ? 'must-fix' : 'look';
    case 'came-so':
      return 'look';
    case 'unknown':
      return serious ? 'must-fix' : 'look';
  }
}
