import { allocate } from './arena';
import {
  mergeLanes,
  prime32a,
  prime32b,
  prime32c,
  prime64a,
  prime64b,
  prime64c,
  prime64d,
  prime64e,
  secret,
  storeDigest,
} from './xxh3-parts';
import { hashShort } from './xxh3-short';

/**
 * XXH3-128 (the xxHash specification, seed 0, default secret) of a stream that arrives in whole
 * blocks of 1,024 bytes and one last, shorter part. That is the block length of the algorithm
 * itself, so nothing has to be put aside but the last 64 bytes: the end of the input is treated
 * differently, and where it is shows only when it is there.
 */

const blockBytes: usize = 1024;
const stripeBytes: usize = 64;
const stripesInBlock: usize = blockBytes / stripeBytes;

/** Up to this length the algorithm is another one, and needs all bytes at once. */
const longestShort: usize = 240;

@unmanaged
export class Hash {
  /** Eight lanes of 64 bits. */
  lanes: usize;
  /** The lanes as they were in front of the last stripe of the last block. */
  lanesBefore: usize;
  /** The last stripe of what came in whole blocks. */
  lastStripe: usize;
  length: u64;
  /** 16 bytes: the digest as it is printed. */
  digest: usize;
}

export function newHash(): Hash {
  const hash = changetype<Hash>(allocate(offsetof<Hash>()));
  hash.lanes = allocate(stripeBytes);
  hash.lanesBefore = allocate(stripeBytes);
  hash.lastStripe = allocate(stripeBytes);
  hash.digest = allocate(16);
  store<u64>(hash.lanes, prime32c);
  store<u64>(hash.lanes, prime64a, 8);
  store<u64>(hash.lanes, prime64b, 16);
  store<u64>(hash.lanes, prime64c, 24);
  store<u64>(hash.lanes, prime64d, 32);
  store<u64>(hash.lanes, prime32b, 40);
  store<u64>(hash.lanes, prime64e, 48);
  store<u64>(hash.lanes, prime32a, 56);
  return hash;
}

/** `bytes` is a multiple of 1,024. */
export function updateHash(hash: Hash, from: usize, bytes: usize): void {
  const end = from + bytes;
  for (let at = from; at < end; at += blockBytes) {
    accumulate(hash.lanes, at, stripesInBlock - 1);
    if (at + blockBytes == end) memory.copy(hash.lanesBefore, hash.lanes, stripeBytes);
    accumulateStripe(hash.lanes, at + blockBytes - stripeBytes, secret + 8 * (stripesInBlock - 1));
    scramble(hash.lanes);
  }
  memory.copy(hash.lastStripe, end - stripeBytes, stripeBytes);
  hash.length += bytes;
}

/** Takes the rest, less than 1,024 bytes or more, and writes the digest. */
export function finishHash(hash: Hash, from: usize, bytes: usize): void {
  const whole = bytes & ~(blockBytes - 1);
  if (whole > 0) updateHash(hash, from, whole);
  from += whole;
  bytes -= whole;
  const before = hash.length;
  hash.length += bytes;
  if (hash.length <= longestShort) {
    hashShort(from, bytes, hash.digest);
    return;
  }
  const lanes = hash.lanes;
  if (bytes == 0) {
    // The last block is not scrambled, nor is its last stripe one of the others.
    memory.copy(lanes, hash.lanesBefore, stripeBytes);
  } else {
    accumulate(lanes, from, (bytes - 1) / stripeBytes);
    if (bytes < stripeBytes && before > 0) {
      // The last 64 bytes begin in the block before.
      memory.copy(hash.lastStripe, hash.lastStripe + bytes, stripeBytes - bytes);
      memory.copy(hash.lastStripe + stripeBytes - bytes, from, bytes);
    } else {
      memory.copy(hash.lastStripe, from + bytes - stripeBytes, stripeBytes);
    }
  }
  accumulateStripe(lanes, hash.lastStripe, secret + 121);
  const low = mergeLanes(lanes, secret + 11, hash.length * prime64a);
  const high = mergeLanes(lanes, secret + 117, ~(hash.length * prime64b));
  storeDigest(hash.digest, high, low);
}

/** Up to 16 stripes from the start of a block. */
function accumulate(lanes: usize, from: usize, stripes: usize): void {
  let a = v128.load(lanes);
  let b = v128.load(lanes, 16);
  let c = v128.load(lanes, 32);
  let d = v128.load(lanes, 48);
  let key = secret;
  for (const end = from + stripes * stripeBytes; from < end; from += stripeBytes, key += 8) {
    a = mix(a, v128.load(from), v128.load(key));
    b = mix(b, v128.load(from, 16), v128.load(key, 16));
    c = mix(c, v128.load(from, 32), v128.load(key, 32));
    d = mix(d, v128.load(from, 48), v128.load(key, 48));
  }
  v128.store(lanes, a);
  v128.store(lanes, b, 16);
  v128.store(lanes, c, 32);
  v128.store(lanes, d, 48);
}

function accumulateStripe(lanes: usize, from: usize, key: usize): void {
  for (let at: usize = 0; at < stripeBytes; at += 16) {
    const lane = mix(v128.load(lanes + at), v128.load(from + at), v128.load(key + at));
    v128.store(lanes + at, lane);
  }
}

/** Two lanes: each takes in its neighbour's data, and the product of its own keyed halves. */
function mix(lanes: v128, data: v128, key: v128): v128 {
  const keyed = v128.xor(data, key);
  const low = i32x4.shuffle(keyed, keyed, 0, 2, 0, 2);
  const high = i32x4.shuffle(keyed, keyed, 1, 3, 1, 3);
  const product = i64x2.extmul_low_i32x4_u(low, high);
  return i64x2.add(lanes, i64x2.add(product, i64x2.shuffle(data, data, 1, 0)));
}

function scramble(lanes: usize): void {
  for (let i: usize = 0; i < stripeBytes; i += 8) {
    let lane = load<u64>(lanes + i);
    lane ^= lane >> 47;
    lane ^= load<u64>(secret + 128 + i);
    store<u64>(lanes + i, lane * prime32a);
  }
}
