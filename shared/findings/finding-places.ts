import type { FrameRange } from '../measure/measures.ts';
import { maxFindingRanges, type FindingRange } from './finding.ts';

/** Places of one finding in several channels, laid over one another. */
export type FoundPlaces = { places: number; ranges: FindingRange[] };

/**
 * Joins the places of several channels: what overlaps is one place. Each channel brings its true
 * count and the ranges that were kept; where a channel kept fewer than it counted, the total is
 * at least its count.
 */
export function joinPlaces(
  channels: readonly { count: number; ranges: readonly FrameRange[] }[],
  confidence: FindingRange['confidence'] = 'sure',
): FoundPlaces {
  const sorted = channels
    .flatMap((channel) => channel.ranges)
    .sort((a, b) => a.startFrame - b.startFrame || a.endFrame - b.endFrame);
  const joined: FindingRange[] = [];
  for (const { startFrame, endFrame } of sorted) {
    const last = joined.at(-1);
    if (last && startFrame <= last.endFrame) last.endFrame = Math.max(last.endFrame, endFrame);
    else joined.push({ startFrame, endFrame, confidence });
  }
  const most = Math.max(0, ...channels.map((channel) => channel.count));
  return { places: Math.max(joined.length, most), ranges: joined.slice(0, maxFindingRanges) };
}
