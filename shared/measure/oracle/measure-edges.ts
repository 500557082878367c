import type { TrackFormat } from '../../wave/track-format.ts';
import {
  edgeFrames,
  floorBins,
  floorBinsPerOctave,
  floorLowestExponent,
  floorShare,
  rampOutermost,
  rampQuarter,
  tailFrames,
  windowFrames,
} from '../definitions.ts';
import type { RawEdge } from '../raw-measures.ts';
import { peakOf } from './measure-levels.ts';

/** How the file begins and ends, and what it sounds like when it is quiet. */
export function measureEdges(samples: Float64Array, format: TrackFormat) {
  const length = edgeFrames(format);
  return {
    startEdge: describeEdge(samples.slice(0, length)),
    endEdge: describeEdge(samples.slice(-length).reverse()),
    tailPeak: peakOf(samples.slice(Math.max(0, samples.length - tailFrames(format)))),
    floor: findFloor(samples, format),
  };
}

function describeEdge(edge: Float64Array): RawEdge {
  return { peak: peakOf(edge), ramps: isRamp(edge) };
}

/**
 * Whether a stretch, from its outermost sample inwards, comes out of silence: a fade of two
 * milliseconds or more does, a sound that was cut does not. Silence itself does.
 */
export function isRamp(edge: Float64Array): boolean {
  const peak = peakOf(edge);
  const quarter = edge.subarray(0, Math.max(1, Math.floor(edge.length / 4)));
  return Math.abs(edge[0] ?? 0) <= rampOutermost * peak && peakOf(quarter) <= rampQuarter * peak;
}

/** The level below which a tenth of the windows of about 50 ms stay; a last part is left out. */
function findFloor(samples: Float64Array, format: TrackFormat): number {
  const length = windowFrames(50, format);
  const levels: number[] = [];
  for (let start = 0; start + length <= samples.length; start += length) {
    levels.push(binLevel(Math.fround(peakOf(samples.subarray(start, start + length)))));
  }
  levels.sort((a, b) => a - b);
  return levels[Math.ceil(levels.length * floorShare) - 1] ?? 0;
}

/** The lower end of the bin in which a level lies; 0 in the lowest. */
function binLevel(level: number): number {
  if (level < 2 ** floorLowestExponent) return 0;
  const exponent = Math.floor(Math.log2(level));
  const part = Math.floor((level / 2 ** exponent - 1) * floorBinsPerOctave);
  const bin = (exponent - floorLowestExponent) * floorBinsPerOctave + part;
  if (bin === 0) return 0;
  const highest = Math.min(bin, floorBins - 1);
  const octave = floorLowestExponent + Math.floor(highest / floorBinsPerOctave);
  return 2 ** octave * (1 + (highest % floorBinsPerOctave) / floorBinsPerOctave);
}
