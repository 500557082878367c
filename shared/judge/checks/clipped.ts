import { joinPlaces } from '../../findings/finding-places.ts';
import type { Level } from '../../findings/finding.ts';
import { found, type TrackCheck } from '../check.ts';
import { isClipped } from '../clipped-channels.ts';
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
