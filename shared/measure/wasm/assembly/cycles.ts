import { larger } from './extremes';
import { allocate } from './arena';
import { clippingFloor, clippingTolerance, mostCycles, shortestRun } from './parameters';
import { extendRun, leavesSteeply, Run, startRun } from './run';

/** Cycles of the waveform and those with a flat top; see oracle/measure-clipping.ts. */
@unmanaged
export class Cycles {
  /** A run was found. */
  started: bool;
  count: f64;
  flatCount: f64;
  /** The cycle that is going on. */
  sign: f64;
  peak: f64;
  flatLevel: f64;
  /** Samples within the tolerance of `first`, on the side of `first`. */
  run: Run;
  first: f64;
}

export function newCycles(): Cycles {
  const cycles = changetype<Cycles>(allocate(offsetof<Cycles>()));
  cycles.run = changetype<Run>(allocate(offsetof<Run>()));
  return cycles;
}

export function resetCycles(cycles: Cycles, started: bool): void {
  cycles.started = started;
  cycles.count = 0;
  cycles.flatCount = 0;
  cycles.sign = 0;
  cycles.peak = 0;
  cycles.flatLevel = 0;
  cycles.run.length = 0;
}

export function isCounting(cycles: Cycles): bool {
  return cycles.started && cycles.count < mostCycles;
}

export function countCycles(cycles: Cycles, sample: f64, before: f64): void {
  const run = cycles.run;
  if (run.length > 0 && Math.abs(sample - cycles.first) <= clippingTolerance) {
    extendRun(run, upright(cycles.first, sample));
  } else {
    endFlatRun(cycles, sample);
    cycles.first = sample;
    startRun(run, 0, upright(sample, before), upright(sample, sample));
  }
  if (sample != 0 && sample * cycles.sign <= 0) {
    endCycle(cycles);
    cycles.sign = sample < 0 ? -1 : 1;
    cycles.peak = 0;
    cycles.flatLevel = 0;
  }
  cycles.peak = larger(cycles.peak, Math.abs(sample));
}

/** `sample` seen from the side of zero on which `reference` is. */
function upright(reference: f64, sample: f64): f64 {
  return reference < 0 ? -sample : sample;
}

function endFlatRun(cycles: Cycles, after: f64): void {
  const run = cycles.run;
  if (run.length < shortestRun || Math.abs(cycles.first) <= clippingFloor) return;
  if (!leavesSteeply(run, upright(cycles.first, after))) return;
  cycles.flatLevel = larger(cycles.flatLevel, run.high);
}

/** Counts the cycle that has ended. */
export function endCycle(cycles: Cycles): void {
  if (cycles.peak <= clippingFloor) return;
  cycles.count += 1;
  if (cycles.flatLevel >= cycles.peak - clippingTolerance) cycles.flatCount += 1;
}
