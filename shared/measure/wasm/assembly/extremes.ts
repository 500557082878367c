/**
 * Maximum and minimum of numbers that are never NaN, as one instruction: the language's own have
 * to treat NaN and signed zeros, which costs several and a jump.
 */

export function larger(a: f64, b: f64): f64 {
  return f64x2.extract_lane(f64x2.pmax(f64x2.splat(a), f64x2.splat(b)), 0);
}

export function smaller(a: f64, b: f64): f64 {
  return f64x2.extract_lane(f64x2.pmin(f64x2.splat(a), f64x2.splat(b)), 0);
}
