import { larger } from './extremes';
import { granuleFrames } from './block';
import { Channel } from './channel';
import { blockPeak, highest, lowest } from './levels';

/**
 * True peak (ITU-R BS.1770-5, Annex 2), looked for only where it can be.
 *
 * The filter's phases can exceed the samples they see 2.02283 times at most, the largest sum of
 * the magnitudes of one phase's taps. More narrowly, each phase is a straight line between two
 * samples plus a weighted sum of second differences: with the largest sample m and the largest
 * second difference d, the outer phases stay below 1.00159 m + 0.16419 d and the inner ones
 * below 0.97303 m + 0.56971 d. Granules that cannot beat the peak so far are left out, which
 * changes nothing in the result.
 */
const mostGain: f64 = 2.02283;
const outerLevel: f64 = 1.00159;
const outerBend: f64 = 0.16419;
const innerLevel: f64 = 0.97303;
const innerBend: f64 = 0.56971;

/** Single precision finds candidates; its error is below this share of the peak. */
const slack: f64 = 0.999995;

const tapCount: i32 = 12;
const outer = memory.data<f64>([
  0.001708984375, 0.010986328125, -0.0196533203125, 0.033203125, -0.0594482421875, 0.1373291015625,
  0.97216796875, -0.102294921875, 0.047607421875, -0.026611328125, 0.014892578125, -0.00830078125,
]);
const inner = memory.data<f64>([
  -0.0291748046875, 0.029296875, -0.0517578125, 0.089111328125, -0.16650390625, 0.465087890625,
  0.77978515625, -0.2003173828125, 0.1015625, -0.0582275390625, 0.0330810546875, -0.0189208984375,
]);

export function findTruePeak<T extends number>(channel: Channel, frames: i32): void {
  const granules = (frames + granuleFrames - 1) / granuleFrames;
  let previous = channel.previousPeak;
  let best = larger(channel.truePeak, blockPeak);
  channel.truePeak = best;
  if (larger(previous, blockPeak) * mostGain <= best) {
    channel.previousPeak = granulePeak(granules - 1);
    return;
  }
  for (let granule = 0; granule < granules; granule++) {
    const own = granulePeak(granule);
    const level = larger(previous, own);
    previous = own;
    if (level * mostGain <= best) continue;
    const first = granule * granuleFrames;
    if (first + granuleFrames > frames) {
      best = interpolate<T>(channel, first, frames, best);
    } else if (canExceed<T>(channel, first, level, best)) {
      best = searchGranule<T>(channel, first, best);
    }
  }
  channel.previousPeak = previous;
  channel.truePeak = best;
}

function granulePeak(granule: i32): f64 {
  const at = (<usize>granule) << 3;
  return larger(load<f64>(highest + at), -load<f64>(lowest + at));
}

function canExceed<T extends number>(channel: Channel, first: i32, level: f64, best: f64): bool {
  const bend = largestBend<T>(channel.samples + <usize>first * sizeof<T>());
  return (
    outerLevel * level + outerBend * bend > best || innerLevel * level + innerBend * bend > best
  );
}

/** The largest second difference of a granule and of the samples its filter sees before it. */
function largestBend<T extends number>(samples: usize): f64 {
  let most = v128.splat<T>(<T>0);
  let other = most;
  const end = samples + <usize>(granuleFrames - 2) * sizeof<T>();
  // 80 of them from 18 samples before: two vectors at a time come out even.
  for (let at = samples - 18 * sizeof<T>(); at < end; at += 32) {
    most = v128.pmax<T>(most, bendAt<T>(at));
    other = v128.pmax<T>(other, bendAt<T>(at + 16));
  }
  return largestLane<T>(v128.pmax<T>(most, other));
}

function bendAt<T extends number>(at: usize): v128 {
  const middle = v128.load(at, sizeof<T>());
  const around = v128.add<T>(v128.load(at), v128.load(at, 2 * sizeof<T>()));
  return v128.abs<T>(v128.sub<T>(around, v128.add<T>(middle, middle)));
}

function largestLane<T extends number>(values: v128): f64 {
  if (sizeof<T>() == 8) {
    return larger(f64x2.extract_lane(values, 0), f64x2.extract_lane(values, 1));
  }
  return larger(
    larger(<f64>f32x4.extract_lane(values, 0), <f64>f32x4.extract_lane(values, 1)),
    larger(<f64>f32x4.extract_lane(values, 2), <f64>f32x4.extract_lane(values, 3)),
  );
}

/**
 * The four phases are two and their mirror images. With the sums s and differences d of the
 * samples that lie opposite each other, a phase is E(s) + O(d) and its mirror E(s) - O(d), so
 * the larger of both is |E| + |O|: half the multiplications.
 */
function searchGranule<T extends number>(channel: Channel, first: i32, best: f64): f64 {
  const lanes = 16 / <i32>sizeof<T>();
  let at = channel.samples + <usize>first * sizeof<T>();
  for (let i = 0; i < granuleFrames; i += lanes, at += 16) {
    let outerEven = v128.splat<T>(<T>0);
    let outerOdd = outerEven;
    let innerEven = outerEven;
    let innerOdd = outerEven;
    for (let tap = 0; tap < tapCount / 2; tap++) {
      const near = v128.load(at - <usize>tap * sizeof<T>());
      const far = v128.load(at - <usize>(tapCount - 1 - tap) * sizeof<T>());
      const sum = v128.add<T>(near, far);
      const difference = v128.sub<T>(near, far);
      outerEven = v128.add<T>(outerEven, v128.mul<T>(sum, even<T>(outer, tap)));
      outerOdd = v128.add<T>(outerOdd, v128.mul<T>(difference, odd<T>(outer, tap)));
      innerEven = v128.add<T>(innerEven, v128.mul<T>(sum, even<T>(inner, tap)));
      innerOdd = v128.add<T>(innerOdd, v128.mul<T>(difference, odd<T>(inner, tap)));
    }
    const most = v128.pmax<T>(
      v128.add<T>(v128.abs<T>(outerEven), v128.abs<T>(outerOdd)),
      v128.add<T>(v128.abs<T>(innerEven), v128.abs<T>(innerOdd)),
    );
    if (largestLane<T>(most) > best * slack) {
      best = interpolate<T>(channel, first + i, first + i + lanes, best);
    }
  }
  return best;
}

function even<T extends number>(phase: usize, tap: i32): v128 {
  return v128.splat<T>(<T>((coefficient(phase, tap) + coefficient(phase, 11 - tap)) / 2));
}

function odd<T extends number>(phase: usize, tap: i32): v128 {
  return v128.splat<T>(<T>((coefficient(phase, tap) - coefficient(phase, 11 - tap)) / 2));
}

function coefficient(phase: usize, tap: i32): f64 {
  return load<f64>(phase + ((<usize>tap) << 3));
}

/** The larger of `best` and all four phases at some samples, in double precision. */
function interpolate<T extends number>(channel: Channel, from: i32, to: i32, best: f64): f64 {
  for (let i = from; i < to; i++) {
    let outerPhase: f64 = 0;
    let outerMirror: f64 = 0;
    let innerPhase: f64 = 0;
    let innerMirror: f64 = 0;
    for (let tap = 0; tap < tapCount; tap++) {
      const at = channel.samples + <usize>(<isize>(i - tap) * <isize>sizeof<T>());
      const sample = <f64>load<T>(at);
      outerPhase += coefficient(outer, tap) * sample;
      outerMirror += coefficient(outer, 11 - tap) * sample;
      innerPhase += coefficient(inner, tap) * sample;
      innerMirror += coefficient(inner, 11 - tap) * sample;
    }
    best = larger(best, larger(Math.abs(outerPhase), Math.abs(outerMirror)));
    best = larger(best, larger(Math.abs(innerPhase), Math.abs(innerMirror)));
  }
  return best;
}
