/** Constants of XXH3 and its mixing functions. */

/** The default secret of the specification, 192 bytes. */
export const secret: usize = memory.data<u64>(
  [
    0xbe4ba423396cfeb8, 0x1cad21f72c81017c, 0xdb979083e96dd4de, 0x1f67b3b7a4a44072,
    0x78e5c0cc4ee679cb, 0x2172ffcc7dd05a82, 0x8e2443f7744608b8, 0x4c263a81e69035e0,
    0xcb00c391bb52283c, 0xa32e531b8b65d088, 0x4ef90da297486471, 0xd8acdea946ef1938,
    0x3f349ce33f76faa8, 0x1d4f0bc7c7bbdcf9, 0x3159b4cd4be0518a, 0x647378d9c97e9fc8,
    0xc3ebd33483acc5ea, 0xeb6313faffa081c5, 0x49daf0b751dd0d17, 0x9e68d429265516d3,
    0xfca1477d58be162b, 0xce31d07ad1b8f88f, 0x280416958f3acb45, 0x7e404bbbcafbd7af,
  ],
  16,
);

export const prime32a: u64 = 0x9e3779b1;
export const prime32b: u64 = 0x85ebca77;
export const prime32c: u64 = 0xc2b2ae3d;
export const prime64a: u64 = 0x9e3779b185ebca87;
export const prime64b: u64 = 0xc2b2ae3d27d4eb4f;
export const prime64c: u64 = 0x165667b19e3779f9;
export const prime64d: u64 = 0x85ebca77c2b2ae63;
export const prime64e: u64 = 0x27d4eb2f165667c5;

/** Upper half of the product of two 64-bit numbers. */
export function multiplyHigh(a: u64, b: u64): u64 {
  const lowA = a & 0xffffffff;
  const lowB = b & 0xffffffff;
  const highA = a >> 32;
  const highB = b >> 32;
  const crossed = highA * lowB + ((lowA * lowB) >> 32);
  const carried = lowA * highB + (crossed & 0xffffffff);
  return highA * highB + (crossed >> 32) + (carried >> 32);
}

/** The product's halves, exclusive or. */
export function foldProduct(a: u64, b: u64): u64 {
  return (a * b) ^ multiplyHigh(a, b);
}

export function avalanche(value: u64): u64 {
  value ^= value >> 37;
  value *= 0x165667919e3779f9;
  return value ^ (value >> 32);
}

/** The older finish, of XXH64. */
export function avalanche64(value: u64): u64 {
  value ^= value >> 33;
  value *= prime64b;
  value ^= value >> 29;
  value *= prime64c;
  return value ^ (value >> 32);
}

/** The eight lanes of a long input in one number. */
export function mergeLanes(lanes: usize, key: usize, start: u64): u64 {
  let result = start;
  for (let i: usize = 0; i < 64; i += 16) {
    const a = load<u64>(lanes + i) ^ load<u64>(key + i);
    const b = load<u64>(lanes + i, 8) ^ load<u64>(key + i, 8);
    result += foldProduct(a, b);
  }
  return avalanche(result);
}

/** The digest as it is printed: the upper half first, both big-endian. */
export function storeDigest(to: usize, high: u64, low: u64): void {
  store<u64>(to, bswap<u64>(high));
  store<u64>(to, bswap<u64>(low), 8);
}
