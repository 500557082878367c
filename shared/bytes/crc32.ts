/**
 * CRC-32 as zip files use it (ITU-T V.42: polynomial 0x04C11DB7, reflected, complemented), and
 * the algebra that tells the CRC of a file whose beginning or end was exchanged without reading
 * the middle again. Check value: crc32("123456789") = 0xCBF43926.
 */

const polynomial = 0xedb88320;
const lanes = 16;

/** tables[k][b]: the effect of byte b, k bytes before the end of a group. */
const tables: readonly Int32Array[] = makeTables();

function makeTables(): Int32Array[] {
  const first = new Int32Array(256);
  for (let byte = 0; byte < 256; byte++) {
    let value = byte;
    for (let bit = 0; bit < 8; bit++) value = value & 1 ? (value >>> 1) ^ polynomial : value >>> 1;
    first[byte] = value;
  }
  const all = [first];
  for (let lane = 1; lane < lanes; lane++) {
    const table = new Int32Array(256);
    const before = all[lane - 1] as Int32Array;
    for (let byte = 0; byte < 256; byte++) {
      const value = before[byte] as number;
      table[byte] = (first[value & 0xff] as number) ^ (value >>> 8);
    }
    all.push(table);
  }
  return all;
}

/** Continues a CRC-32 over `bytes`; `previous` is the CRC of everything before (0 at the start). */
export function crc32(bytes: Uint8Array, previous = 0): number {
  let crc = ~previous;
  let at = 0;
  const [t0, t1, t2, t3, t4, t5, t6, t7, t8, t9, t10, t11, t12, t13, t14, t15] =
    tables as unknown as Int32Array[] & { length: 16 };
  // Sixteen bytes a step, each through its own table: the lookups do not wait for each other.
  for (const end = bytes.length - 15; at < end; at += 16) {
    const w =
      crc ^ (bytes[at]! | (bytes[at + 1]! << 8) | (bytes[at + 2]! << 16) | (bytes[at + 3]! << 24));
    crc =
      t15![w & 0xff]! ^
      t14![(w >>> 8) & 0xff]! ^
      t13![(w >>> 16) & 0xff]! ^
      t12![w >>> 24]! ^
      t11![bytes[at + 4]!]! ^
      t10![bytes[at + 5]!]! ^
      t9![bytes[at + 6]!]! ^
      t8![bytes[at + 7]!]! ^
      t7![bytes[at + 8]!]! ^
      t6![bytes[at + 9]!]! ^
      t5![bytes[at + 10]!]! ^
      t4![bytes[at + 11]!]! ^
      t3![bytes[at + 12]!]! ^
      t2![bytes[at + 13]!]! ^
      t1![bytes[at + 14]!]! ^
      t0![bytes[at + 15]!]!;
  }
  for (; at < bytes.length; at++) crc = (crc >>> 8) ^ t0![(crc ^ bytes[at]!) & 0xff]!;
  return ~crc >>> 0;
}

/** Product of two polynomials over GF(2) modulo the CRC's; bit 31 is the constant term. */
function multiply(a: number, b: number): number {
  let product = 0;
  for (let mask = 0x80000000; mask !== 0; mask >>>= 1) {
    if (a & mask) product ^= b;
    b = b & 1 ? (b >>> 1) ^ polynomial : b >>> 1;
  }
  return product >>> 0;
}

/** The polynomial is primitive: x to this power is 1 again. */
const order = 0xffffffff;

/** x to the power 8 * bytes (negative: the inverse), modulo the CRC's polynomial. */
function shiftBy(bytes: number): number {
  let exponent = (8 * bytes) % order;
  if (exponent < 0) exponent += order;
  let result = 0x80000000;
  for (let square = 0x40000000; exponent > 0; square = multiply(square, square)) {
    if (exponent % 2 === 1) result = multiply(result, square);
    exponent = Math.floor(exponent / 2);
  }
  return result >>> 0;
}

/** CRC-32 of first and second behind each other, from theirs and the length of the second. */
export function joinCrc32(first: number, second: number, secondBytes: number): number {
  return (multiply(shiftBy(secondBytes), first) ^ second) >>> 0;
}

/** CRC-32 of what is left of `whole` when `tail` is cut from its end. */
export function cutTailCrc32(whole: number, tail: number, tailBytes: number): number {
  return multiply(shiftBy(-tailBytes), (whole ^ tail) >>> 0);
}

/** CRC-32 of what is left of `whole` when `head` is cut from its front; `restBytes` stay. */
export function cutHeadCrc32(whole: number, head: number, restBytes: number): number {
  return (whole ^ multiply(shiftBy(restBytes), head)) >>> 0;
}

export function crc32Hex(crc: number): string {
  return crc.toString(16).padStart(8, '0');
}
