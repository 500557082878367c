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
  /** The cycle that is going on; 0: none. */
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

/** Whether a quiet sample would end something. */
export function isInCycle(cycles: Cycles): bool {
  return cycles.sign != 0;
}

export function countCycles(cycles: Cycles, sample: f64, before: f64): void {
  const run = cycles.run;
  const isLoud = Math.abs(sample) > clippingFloor;
  if (isLoud && run.length > 0 && Math.abs(sample - cycles.first) <= clippingTolerance) {
    extendRun(run, upright(cycles.first, sample));
  } else {
    endFlatRun(cycles, sample);
    cycles.first = sample;
    if (isLoud) startRun(run, 0, upright(sample, before), upright(sample, sample));
    else run.length = 0;
  }
  const sign: f64 = isLoud ? (sample < 0 ? -1 : 1) : 0;
  if (sign != cycles.sign) {
    endCycle(cycles);
    cycles.sign = sign;
    cycles.peak = 0;
    cycles.flatLevel = 0;
  }
  cycles.peak = larger(cycles.peak, Math.abs(sample));
}

/**
 * Takes in a vector of samples where nothing begins or ends: all are quiet, or all belong to the
 * cycle that is going on and none lies near the one before. Answers whether that is so.
 */
export function passCycles<T extends number>(cycles: Cycles, at: usize): bool {
  const run = cycles.run;
  const samples = v128.load(at);
  const loud = v128.gt<T>(v128.abs<T>(samples), v128.splat<T>(<T>(clippingFloor * 0.999999)));
  if (cycles.sign == 0) return run.length == 0 && !v128.any_true(loud);
  if (run.length != 1) return false;
  const upright = cycles.sign > 0 ? samples : v128.neg<T>(samples);
  const within = v128.gt<T>(upright, v128.splat<T>(<T>(clippingFloor * 1.000001)));
  const steps = v128.abs<T>(v128.sub<T>(samples, v128.load(at - sizeof<T>())));
  const steep = v128.gt<T>(steps, v128.splat<T>(<T>(clippingTolerance * 1.000001)));
  if (!v128.all_true<i32>(v128.and(within, steep))) return false;
  const last = at + 16 - sizeof<T>();
  cycles.first = <f64>load<T>(last);
  startRun(run, 0, cycles.sign * <f64>load<T>(last - sizeof<T>()), cycles.sign * cycles.first);
  for (let place = at; place <= last; place += sizeof<T>()) {
    cycles.peak = larger(cycles.peak, Math.abs(<f64>load<T>(place)));
  }
  return true;
}

/** `sample` seen from the side of zero on which `reference` is. */
function upright(reference: f64, sample: f64): f64 {
  return reference < 0 ? -sample : sample;
}

function endFlatRun(cycles: Cycles, after: f64): void {
  const run = cycles.run;
  if (run.length < shortestRun) return;
  if (!leavesSteeply(run, upright(cycles.first, after))) return;
  cycles.flatLevel = larger(cycles.flatLevel, run.high);
}

/** Counts the cycle that has ended. */
export function endCycle(cycles: Cycles): void {
  if (cycles.sign == 0) return;
  cycles.count += 1;
  if (cycles.flatLevel >= cycles.peak - clippingTolerance) cycles.flatCount += 1;
}
