/**
 * SHA-256 (FIPS 180-4, section 6.2) in plain TypeScript: works everywhere without waiting. Where
 * gigabytes are packed, an adapter hands in a faster one (see checksums.ts).
 */

const blockBytes = 64;

/** First 32 bits of the fractional parts of the cube roots of the first 64 primes (4.2.2). */
const roundConstants = fractions(64, Math.cbrt);
/** The same of the square roots of the first 8 primes (5.3.3). */
const startState = fractions(8, Math.sqrt);

function fractions(count: number, root: (n: number) => number): Int32Array {
  const words = new Int32Array(count);
  let found = 0;
  for (let candidate = 2; found < count; candidate++) {
    let prime = true;
    for (let d = 2; d * d <= candidate; d++) if (candidate % d === 0) prime = false;
    if (!prime) continue;
    const value = root(candidate);
    words[found++] = Math.floor((value - Math.floor(value)) * 2 ** 32) | 0;
  }
  return words;
}

/** Bytes in, in any pieces; the digest out, once. */
export class Sha256 {
  private readonly state = startState.slice();
  private readonly schedule = new Int32Array(64);
  private readonly pending = new Uint8Array(blockBytes);
  private pendingBytes = 0;
  private totalBytes = 0;

  update(bytes: Uint8Array): void {
    this.totalBytes += bytes.length;
    let at = 0;
    if (this.pendingBytes > 0) {
      at = Math.min(blockBytes - this.pendingBytes, bytes.length);
      this.pending.set(bytes.subarray(0, at), this.pendingBytes);
      this.pendingBytes += at;
      if (this.pendingBytes < blockBytes) return;
      this.compress(this.pending, 0);
      this.pendingBytes = 0;
    }
    for (; at + blockBytes <= bytes.length; at += blockBytes) this.compress(bytes, at);
    this.pending.set(bytes.subarray(at));
    this.pendingBytes = bytes.length - at;
  }

  /** 64 lower-case hex digits. Nothing may be added afterwards. */
  digestHex(): string {
    const bits = this.totalBytes * 8;
    const padding = new Uint8Array((this.pendingBytes < 56 ? 56 : 120) - this.pendingBytes + 8);
    padding[0] = 0x80;
    const view = new DataView(padding.buffer);
    view.setUint32(padding.length - 8, Math.floor(bits / 2 ** 32));
    view.setUint32(padding.length - 4, bits % 2 ** 32);
    this.update(padding);
    return Array.from(this.state, (word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
  }

  private compress(bytes: Uint8Array, offset: number): void {
    const w = this.schedule;
    for (let t = 0; t < 16; t++) {
      const p = offset + 4 * t;
      w[t] = (bytes[p]! << 24) | (bytes[p + 1]! << 16) | (bytes[p + 2]! << 8) | bytes[p + 3]!;
    }
    for (let t = 16; t < 64; t++) {
      const a = w[t - 15]!;
      const b = w[t - 2]!;
      const s0 = ((a >>> 7) | (a << 25)) ^ ((a >>> 18) | (a << 14)) ^ (a >>> 3);
      const s1 = ((b >>> 17) | (b << 15)) ^ ((b >>> 19) | (b << 13)) ^ (b >>> 10);
      w[t] = (w[t - 16]! + s0 + w[t - 7]! + s1) | 0;
    }
    const s = this.state;
    let a = s[0]!;
    let b = s[1]!;
    let c = s[2]!;
    let d = s[3]!;
    let e = s[4]!;
    let f = s[5]!;
    let g = s[6]!;
    let h = s[7]!;
    for (let t = 0; t < 64; t++) {
      const S1 = ((e >>> 6) | (e << 26)) ^ ((e >>> 11) | (e << 21)) ^ ((e >>> 25) | (e << 7));
      const choice = (e & f) ^ (~e & g);
      const t1 = (h + S1 + choice + roundConstants[t]! + w[t]!) | 0;
      const S0 = ((a >>> 2) | (a << 30)) ^ ((a >>> 13) | (a << 19)) ^ ((a >>> 22) | (a << 10));
      const majority = (a & b) ^ (a & c) ^ (b & c);
      h = g;
      g = f;
      f = e;
      e = (d + t1) | 0;
      d = c;
      c = b;
      b = a;
      a = (t1 + S0 + majority) | 0;
    }
    s[0] = (s[0]! + a) | 0;
    s[1] = (s[1]! + b) | 0;
    s[2] = (s[2]! + c) | 0;
    s[3] = (s[3]! + d) | 0;
    s[4] = (s[4]! + e) | 0;
    s[5] = (s[5]! + f) | 0;
    s[6] = (s[6]! + g) | 0;
    s[7] = (s[7]! + h) | 0;
  }
}

/** SHA-256 of a text's UTF-8 bytes or of bytes, 64 lower-case hex digits. */
export function sha256Hex(data: string | Uint8Array): string {
  const hash = new Sha256();
  hash.update(typeof data === 'string' ? new TextEncoder().encode(data) : data);
  return hash.digestHex();
}
