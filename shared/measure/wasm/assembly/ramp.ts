import { larger } from './extremes';
import { edgeFrames, rampOutermost, rampQuarter } from './parameters';

/** Peak of the stretch that was last looked at. */
export let edgePeak: f64 = 0;

/**
 * Whether a stretch comes out of silence, from its outermost sample at `at` inwards: towards
 * later samples or, with `direction` -1, towards earlier ones.
 */
export function isRamp<T extends number>(at: usize, direction: i32, available: f64): bool {
  const length = <i32>Math.min(<f64>edgeFrames, available);
  const quarter = max(1, length >> 2);
  const step = <usize>direction * sizeof<T>();
  const outermost = length == 0 ? 0 : Math.abs(<f64>load<T>(at));
  let quarterPeak: f64 = 0;
  let peak: f64 = 0;
  for (let i = 0; i < length; i++, at += step) {
    if (i == quarter) quarterPeak = peak;
    peak = larger(peak, Math.abs(<f64>load<T>(at)));
  }
  if (length <= quarter) quarterPeak = peak;
  edgePeak = peak;
  return outermost <= rampOutermost * peak && quarterPeak <= rampQuarter * peak;
}
