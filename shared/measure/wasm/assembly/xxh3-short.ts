import {
  avalanche,
  avalanche64,
  foldProduct,
  multiplyHigh,
  prime32b,
  prime64a,
  prime64b,
  prime64d,
  secret,
  storeDigest,
} from './xxh3-parts';

/** XXH3-128 of up to 240 bytes (the xxHash specification, seed 0): five ways by length. */
export function hashShort(from: usize, bytes: usize, digest: usize): void {
  if (bytes == 0) hashNothing(digest);
  else if (bytes < 4) hash1To3(from, bytes, digest);
  else if (bytes < 9) hash4To8(from, bytes, digest);
  else if (bytes < 17) hash9To16(from, bytes, digest);
  else if (bytes < 129) hash17To128(from, bytes, digest);
  else hash129To240(from, bytes, digest);
}

function key(offset: usize): u64 {
  return load<u64>(secret + offset);
}

function hashNothing(digest: usize): void {
  storeDigest(digest, avalanche64(key(80) ^ key(88)), avalanche64(key(64) ^ key(72)));
}

function hash1To3(from: usize, bytes: usize, digest: usize): void {
  const first = <u32>load<u8>(from);
  const middle = <u32>load<u8>(from + (bytes >> 1));
  const last = <u32>load<u8>(from + bytes - 1);
  const low = (first << 16) | (middle << 24) | last | ((<u32>bytes) << 8);
  const high = rotl<u32>(bswap<u32>(low), 13);
  const keyLow = <u64>(load<u32>(secret) ^ load<u32>(secret, 4));
  const keyHigh = <u64>(load<u32>(secret, 8) ^ load<u32>(secret, 12));
  storeDigest(digest, avalanche64((<u64>high) ^ keyHigh), avalanche64((<u64>low) ^ keyLow));
}

function hash4To8(from: usize, bytes: usize, digest: usize): void {
  const input = (<u64>load<u32>(from)) | ((<u64>load<u32>(from + bytes - 4)) << 32);
  const keyed = input ^ key(16) ^ key(24);
  const factor = prime64a + ((<u64>bytes) << 2);
  let low = keyed * factor;
  let high = multiplyHigh(keyed, factor);
  high += low << 1;
  low ^= high >> 3;
  low ^= low >> 35;
  low *= 0x9fb21c651e98df25;
  low ^= low >> 28;
  storeDigest(digest, avalanche(high), low);
}

function hash9To16(from: usize, bytes: usize, digest: usize): void {
  const first = load<u64>(from);
  const last = load<u64>(from + bytes - 8);
  const keyed = first ^ last ^ key(32) ^ key(40);
  let low = keyed * prime64a + ((<u64>(bytes - 1)) << 54);
  const end = last ^ key(48) ^ key(56);
  const high = multiplyHigh(keyed, prime64a) + end + (end & 0xffffffff) * (prime32b - 1);
  low ^= bswap<u64>(high);
  storeDigest(
    digest,
    avalanche(multiplyHigh(low, prime64b) + high * prime64b),
    avalanche(low * prime64b),
  );
}

let sumLow: u64 = 0;
let sumHigh: u64 = 0;

function mix16(from: usize, offset: usize): u64 {
  return foldProduct(load<u64>(from) ^ key(offset), load<u64>(from, 8) ^ key(offset + 8));
}

function mix32(first: usize, second: usize, offset: usize): void {
  sumLow += mix16(first, offset);
  sumLow ^= load<u64>(second) + load<u64>(second, 8);
  sumHigh += mix16(second, offset + 16);
  sumHigh ^= load<u64>(first) + load<u64>(first, 8);
}

function storeSums(bytes: usize, digest: usize): void {
  const high = sumLow * prime64a + sumHigh * prime64d + <u64>bytes * prime64b;
  storeDigest(digest, 0 - avalanche(high), avalanche(sumLow + sumHigh));
}

function hash17To128(from: usize, bytes: usize, digest: usize): void {
  const end = from + bytes;
  sumLow = <u64>bytes * prime64a;
  sumHigh = 0;
  if (bytes > 96) mix32(from + 48, end - 64, 96);
  if (bytes > 64) mix32(from + 32, end - 48, 64);
  if (bytes > 32) mix32(from + 16, end - 32, 32);
  mix32(from, end - 16, 0);
  storeSums(bytes, digest);
}

function hash129To240(from: usize, bytes: usize, digest: usize): void {
  sumLow = <u64>bytes * prime64a;
  sumHigh = 0;
  for (let i: usize = 0; i < 128; i += 32) mix32(from + i, from + i + 16, i);
  sumLow = avalanche(sumLow);
  sumHigh = avalanche(sumHigh);
  for (let i: usize = 128; i + 32 <= bytes; i += 32) {
    mix32(from + i, from + i + 16, 3 + i - 128);
  }
  mix32(from + bytes - 16, from + bytes - 32, 103);
  storeSums(bytes, digest);
}
