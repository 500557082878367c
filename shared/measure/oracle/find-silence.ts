import type { TrackFormat } from '../../wave/track-format.ts';
import {
  abruptLevel,
  edgeFrames,
  longestDropoutFrames,
  shortestSilenceFrames,
} from '../definitions.ts';
import { maxPlaces, type FrameRange } from '../measures.ts';
import type { RawPlaces } from '../raw-measures.ts';
import { isRamp } from './measure-edges.ts';

/** Runs of exact zeros of at least a millisecond: the longest, and those that are dropouts. */
export function findSilence(samples: Float64Array, format: TrackFormat) {
  const dropouts: RawPlaces = { count: 0, ranges: [] };
  let longestDigitalSilence: FrameRange | null = null;
  let longest = shortestSilenceFrames(format) - 1;
  for (const silence of zeroRuns(samples, shortestSilenceFrames(format))) {
    const length = silence.endFrame - silence.startFrame;
    if (length > longest) {
      longest = length;
      longestDigitalSilence = silence;
    }
    if (!isDropout(samples, silence, format)) continue;
    dropouts.count++;
    if (dropouts.ranges.length < maxPlaces) dropouts.ranges.push(silence);
  }
  return { longestDigitalSilence, dropouts };
}

function* zeroRuns(samples: Float64Array, shortest: number): Generator<FrameRange> {
  let start = 0;
  for (let i = 0; i <= samples.length; i++) {
    if (samples[i] === 0) continue;
    if (i - start >= shortest) yield { startFrame: start, endFrame: i };
    start = i + 1;
  }
}

/** At most 100 ms inside running sound that stops and goes on without any fade. */
function isDropout(
  samples: Float64Array,
  { startFrame, endFrame }: FrameRange,
  format: TrackFormat,
): boolean {
  if (startFrame === 0 || endFrame === samples.length) return false;
  if (endFrame - startFrame > longestDropoutFrames(format)) return false;
  const edge = edgeFrames(format);
  const before = samples.slice(Math.max(0, startFrame - edge), startFrame).reverse();
  const after = samples.slice(endFrame, endFrame + edge);
  return isAbrupt(before) && isAbrupt(after);
}

/** `edge` goes from the silence into the sound. */
function isAbrupt(edge: Float64Array): boolean {
  return Math.abs(edge[0]!) > abruptLevel && !isRamp(edge);
}
