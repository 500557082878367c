import { larger, smaller } from './extremes';
import { granuleFrames } from './block';
import { Channel } from './channel';
import { blockPeak, highest, lowest } from './levels';

/**
 * True peak (ITU-R BS.1770-5, Annex 2), looked for only where it can be.
 *
 * The filter's phases can exceed the samples they see 2.02283 times at most, the largest sum of
 * the magnitudes of one phase's taps. More narrowly, each phase is a straight line between two
 * samples plus a weighted sum of second differences: with m the larger of these two (the sixth
 * and seventh the filter sees) and d the largest second difference, the outer phases stay below
 * 1.00159 m + 0.16419 d and the inner ones below 0.97303 m + 0.56971 d. What cannot beat the
 * peak so far is left out, which changes nothing in the result.
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
    if (first + granuleFrames > frames) best = interpolate<T>(channel, first, frames, best);
    else best = searchGranule<T>(channel, first, level, best);
  }
  channel.previousPeak = previous;
  channel.truePeak = best;
}

function granulePeak(granule: i32): f64 {
  const at = (<usize>granule) << 3;
  return larger(load<f64>(highest + at), -load<f64>(lowest + at));
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

/** Looks at the samples between which the curve can rise above `best`. */
function searchGranule<T extends number>(channel: Channel, first: i32, level: f64, best: f64): f64 {
  const start = channel.samples + <usize>first * sizeof<T>();
  const bend = largestBend<T>(start);
  let least = leastLevel(bend, best);
  if (level <= least) return best;
  const lanes = 16 / <i32>sizeof<T>();
  for (let i = 0; i < granuleFrames; i += lanes) {
    const at = start + <usize>i * sizeof<T>();
    const sides = v128.pmax<T>(
      v128.abs<T>(v128.load(at - 5 * sizeof<T>())),
      v128.abs<T>(v128.load(at - 6 * sizeof<T>())),
    );
    if (!v128.any_true(v128.gt<T>(sides, v128.splat<T>(<T>(least * slack))))) continue;
    if (largestLane<T>(estimate<T>(at)) > best * slack) {
      best = interpolate<T>(channel, first + i, first + i + lanes, best);
      least = leastLevel(bend, best);
    }
  }
  return best;
}

/** The least level of both samples a line lies between from which it can lead above `best`. */
function leastLevel(bend: f64, best: f64): f64 {
  return smaller((best - outerBend * bend) / outerLevel, (best - innerBend * bend) / innerLevel);
}

/**
 * The largest magnitude of the four phases at some samples. The phases are two and their mirror
 * images. With the sums s and differences d of the samples that lie opposite each other, a phase
 * is E(s) + O(d) and its mirror E(s) - O(d), so the larger of both is |E| + |O|: half the
 * multiplications.
 */
function estimate<T extends number>(at: usize): v128 {
  let outerEven = v128.splat<T>(<T>0);
  let outerOdd = outerEven;
  let innerEven = outerEven;
  let innerOdd = outerEven;
  let factors = sizeof<T>() == 4 ? factors32 : factors64;
  let near = at;
  let far = at - <usize>(tapCount - 1) * sizeof<T>();
  for (; far < near; near -= sizeof<T>(), far += sizeof<T>(), factors += 64) {
    const sum = v128.add<T>(v128.load(near), v128.load(far));
    const difference = v128.sub<T>(v128.load(near), v128.load(far));
    outerEven = v128.add<T>(outerEven, v128.mul<T>(sum, v128.load(factors)));
    outerOdd = v128.add<T>(outerOdd, v128.mul<T>(difference, v128.load(factors, 16)));
    innerEven = v128.add<T>(innerEven, v128.mul<T>(sum, v128.load(factors, 32)));
    innerOdd = v128.add<T>(innerOdd, v128.mul<T>(difference, v128.load(factors, 48)));
  }
  return v128.pmax<T>(
    v128.add<T>(v128.abs<T>(outerEven), v128.abs<T>(outerOdd)),
    v128.add<T>(v128.abs<T>(innerEven), v128.abs<T>(innerOdd)),
  );
}

function coefficient(phase: usize, tap: i32): f64 {
  return load<f64>(phase + ((<usize>tap) << 3));
}

/** The larger of `best` and all four phases at some samples, in double precision. */
function interpolate<T extends number>(channel: Channel, from: i32, to: i32, best: f64): f64 {
  for (let i = from; i < to; i++) {
    // Each with its mirror image.
    let outerPhases = f64x2.splat(0);
    let innerPhases = f64x2.splat(0);
    for (let tap = 0; tap < tapCount; tap++) {
      const at = channel.samples + <usize>(<isize>(i - tap) * <isize>sizeof<T>());
      const sample = f64x2.splat(<f64>load<T>(at));
      const taps = mirrored + ((<usize>tap) << 5);
      outerPhases = f64x2.add(outerPhases, f64x2.mul(v128.load(taps), sample));
      innerPhases = f64x2.add(innerPhases, f64x2.mul(v128.load(taps, 16), sample));
    }
    const most = f64x2.pmax(f64x2.abs(outerPhases), f64x2.abs(innerPhases));
    best = larger(best, largestLane<f64>(most));
  }
  return best;
}

/** Per tap the coefficients of both phases, each beside that of its mirror image. */
const mirrored = memory.data(12 * 32, 16);

/** Per pair of taps what E and O multiply with, in every lane: outer E, O, inner E, O. */
const factors32 = memory.data(6 * 64, 16);
const factors64 = memory.data(6 * 64, 16);

export function prepareTruePeak(): void {
  for (let tap = 0; tap < tapCount; tap++) {
    const at = mirrored + ((<usize>tap) << 5);
    store<f64>(at, coefficient(outer, tap));
    store<f64>(at, coefficient(outer, tapCount - 1 - tap), 8);
    store<f64>(at, coefficient(inner, tap), 16);
    store<f64>(at, coefficient(inner, tapCount - 1 - tap), 24);
  }
  for (let tap = 0; tap < tapCount / 2; tap++) {
    const place = (<usize>tap) << 6;
    storeFactors(place, coefficient(outer, tap), coefficient(outer, tapCount - 1 - tap));
    storeFactors(place + 32, coefficient(inner, tap), coefficient(inner, tapCount - 1 - tap));
  }
}

function storeFactors(place: usize, near: f64, far: f64): void {
  const even = (near + far) / 2;
  const odd = (near - far) / 2;
  v128.store(factors32 + place, f32x4.splat(<f32>even));
  v128.store(factors32 + place, f32x4.splat(<f32>odd), 16);
  v128.store(factors64 + place, f64x2.splat(even));
  v128.store(factors64 + place, f64x2.splat(odd), 16);
}
