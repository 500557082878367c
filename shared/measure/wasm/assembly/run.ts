import { larger, smaller } from './extremes';
import { quantisationStep } from './parameters';

/** Consecutive samples of about one level, and the sample in front of them. */
@unmanaged
export class Run {
  start: f64;
  length: i32;
  before: f64;
  low: f64;
  high: f64;
}

export function startRun(run: Run, start: f64, before: f64, level: f64): void {
  run.start = start;
  run.length = 1;
  run.before = before;
  run.low = level;
  run.high = level;
}

export function extendRun(run: Run, level: f64): void {
  run.length++;
  run.low = smaller(run.low, level);
  run.high = larger(run.high, level);
}

/** See oracle/measure-clipping.ts: steeper than any smooth peak that is as flat as this. */
export function leavesSteeply(run: Run, after: f64): bool {
  const ratio = <f64>(run.length + 1) / <f64>(run.length - 1);
  const natural = (run.high - run.low + quantisationStep) * ratio * ratio + quantisationStep;
  return smaller(run.high - run.before, run.high - after) > natural;
}
