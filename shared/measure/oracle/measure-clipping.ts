import type { TrackFormat } from '../../wave/track-format.ts';
import {
  clippingFloor,
  clippingTolerance,
  fullScaleLevel,
  mostCycles,
  quantisationStep,
  shortestRun,
} from '../definitions.ts';
import { maxPlaces, type FrameRange } from '../measures.ts';
import type { RawClipping } from '../raw-measures.ts';

/**
 * Runs of samples at the highest level of their side of the waveform: what clipping leaves, also
 * when the file was turned down or dithered afterwards.
 *
 * The ceiling of a side is found while going along: a sample that exceeds it by more than the
 * tolerance raises it, and everything counted at the old one is forgotten. A run is counted when
 * the sound leaves it steeply on both sides. A low note's peak is nearly flat as well, but it is
 * a parabola: if a run of n samples differs by d within itself, the next samples can differ from
 * its top by d * ((n + 1) / (n - 1))^2 at most, and by a step for rounding.
 *
 * From the first run on, 2,000 cycles (stretches beyond -34 dBFS on one side of zero) are counted,
 * and those among them whose top is flat at whatever level.
 */
export function measureClipping(samples: Float64Array, format: TrackFormat): RawClipping {
  const tolerance = clippingTolerance(format);
  const step = quantisationStep(format);
  const sides = [newSide(1), newSide(-1)];
  let cycles: Cycles | null = null;

  for (let i = 0; i <= samples.length; i++) {
    // Around the file there is silence.
    const sample = samples[i] ?? 0;
    const before = samples[i - 1] ?? 0;
    for (const side of sides) {
      const level = sample * side.sign;
      if (level > side.ceiling + tolerance) {
        Object.assign(side, { ...newSide(side.sign), ceiling: level });
        startRun(side, i, before, level);
        if (sides.every(({ runs }) => runs === 0)) cycles = null;
      } else if (level >= side.ceiling - tolerance && level > clippingFloor) {
        if (side.length === 0) startRun(side, i, before, level);
        else extendRun(side, level);
      } else if (side.length > 0) {
        if (side.length >= shortestRun && leavesSteeply(side, level, step)) {
          keepRun(side, fullScaleLevel(format));
          cycles ??= newCycles();
        }
        side.length = 0;
      }
    }
    if (cycles && cycles.count < mostCycles) countCycles(cycles, sample, before, tolerance, step);
  }
  if (cycles && cycles.count < mostCycles) endCycle(cycles, tolerance);

  const [upper, lower] = sides as [Side, Side];
  return {
    runs: upper.runs + lower.runs,
    samples: upper.samples + lower.samples,
    longestRunFrames: Math.max(upper.longest, lower.longest),
    ceiling: Math.max(...sides.map(({ runs, ceiling }) => (runs > 0 ? ceiling : 0))),
    fullScaleRuns: upper.fullScaleRuns + lower.fullScaleRuns,
    cycles: cycles?.count ?? 0,
    flatCycles: cycles?.flatCount ?? 0,
    ranges: [...upper.ranges, ...lower.ranges]
      .sort((a, b) => a.startFrame - b.startFrame)
      .slice(0, maxPlaces),
  };
}

/** Consecutive samples of about one level. `before` is the sample in front of them. */
type Run = { start: number; length: number; before: number; low: number; high: number };

type Side = Run & {
  sign: 1 | -1;
  ceiling: number;
  runs: number;
  samples: number;
  longest: number;
  fullScaleRuns: number;
  ranges: FrameRange[];
};

function newSide(sign: 1 | -1): Side {
  const run = { start: 0, length: 0, before: 0, low: 0, high: 0 };
  const counts = { runs: 0, samples: 0, longest: 0, fullScaleRuns: 0, ranges: [] };
  return { ...run, ...counts, sign, ceiling: clippingFloor };
}

function startRun(side: Side, start: number, before: number, level: number): void {
  Object.assign(side, { start, length: 1, before: before * side.sign, low: level, high: level });
}

function extendRun(run: Run, level: number): void {
  run.length++;
  run.low = Math.min(run.low, level);
  run.high = Math.max(run.high, level);
}

function leavesSteeply(run: Run, after: number, step: number): boolean {
  const ratio = (run.length + 1) / (run.length - 1);
  const natural = (run.high - run.low + step) * ratio * ratio + step;
  return Math.min(run.high - run.before, run.high - after) > natural;
}

function keepRun(side: Side, fullScale: number): void {
  side.runs++;
  side.samples += side.length;
  side.longest = Math.max(side.longest, side.length);
  if (side.high >= fullScale) side.fullScaleRuns++;
  if (side.ranges.length < maxPlaces) {
    side.ranges.push({ startFrame: side.start, endFrame: side.start + side.length });
  }
}

type Cycles = {
  count: number;
  flatCount: number;
  /** The cycle that is going on: its side (0: none), its peak, the highest flat run on it. */
  sign: number;
  peak: number;
  flatLevel: number;
  /** Samples within the tolerance of the first of them, at any level. */
  run: Run & { first: number };
};

function newCycles(): Cycles {
  const run = { start: 0, length: 0, before: 0, low: 0, high: 0, first: 0 };
  return { count: 0, flatCount: 0, sign: 0, peak: 0, flatLevel: 0, run };
}

function countCycles(
  cycles: Cycles,
  sample: number,
  before: number,
  tolerance: number,
  step: number,
): void {
  const { run } = cycles;
  const isLoud = Math.abs(sample) > clippingFloor;
  if (isLoud && run.length > 0 && Math.abs(sample - run.first) <= tolerance) {
    extendRun(run, sample);
  } else {
    endFlatRun(cycles, sample, step);
    const length = isLoud ? 1 : 0;
    Object.assign(run, { length, before, low: sample, high: sample, first: sample });
  }
  const sign = isLoud ? Math.sign(sample) : 0;
  if (sign !== cycles.sign) {
    endCycle(cycles, tolerance);
    Object.assign(cycles, { sign, peak: 0, flatLevel: 0 });
  }
  cycles.peak = Math.max(cycles.peak, Math.abs(sample));
}

function endFlatRun(cycles: Cycles, after: number, step: number): void {
  const { run } = cycles;
  if (run.length < shortestRun) return;
  const sign = Math.sign(run.first);
  const upright = {
    ...run,
    before: run.before * sign,
    low: sign > 0 ? run.low : -run.high,
    high: sign > 0 ? run.high : -run.low,
  };
  if (leavesSteeply(upright, after * sign, step)) {
    cycles.flatLevel = Math.max(cycles.flatLevel, upright.high);
  }
}

function endCycle(cycles: Cycles, tolerance: number): void {
  if (cycles.sign === 0) return;
  cycles.count++;
  if (cycles.flatLevel >= cycles.peak - tolerance) cycles.flatCount++;
}
