import { crc32 as zlibCrc32 } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { crc32, cutHeadCrc32, cutTailCrc32, joinCrc32 } from '#shared/bytes/crc32.ts';

const bytes = fc.uint8Array({ maxLength: 300 });

describe('crc32', () => {
  it('has the check value of the CRC catalogue (CRC-32/ISO-HDLC)', () => {
    expect(crc32(new TextEncoder().encode('123456789'))).toBe(0xcbf43926);
    expect(crc32(new Uint8Array(0))).toBe(0);
  });

  it("agrees with zlib's, however the bytes are cut", () => {
    fc.assert(
      fc.property(bytes, bytes, (a, b) => {
        expect(crc32(b, crc32(a))).toBe(zlibCrc32(Buffer.concat([a, b])));
      }),
    );
  });

  it("joins and cuts as if zlib's had read the bytes", () => {
    fc.assert(
      fc.property(bytes, bytes, bytes, (head, middle, tail) => {
        const whole = zlibCrc32(Buffer.concat([head, middle, tail]));
        expect(
          joinCrc32(zlibCrc32(Buffer.concat([head, middle])), zlibCrc32(tail), tail.length),
        ).toBe(whole);
        const withoutTail = cutTailCrc32(whole, zlibCrc32(tail), tail.length);
        expect(cutHeadCrc32(withoutTail, zlibCrc32(head), middle.length)).toBe(zlibCrc32(middle));
      }),
    );
  });

  it('joins over lengths beyond 32 bits', () => {
    // Doubling 1 MiB of zeros thirteen times is 8 GiB; the same by one step of another length.
    const mebibyte = zlibCrc32(Buffer.alloc(1 << 20));
    let doubled = mebibyte;
    for (let i = 0; i < 13; i++) doubled = joinCrc32(doubled, doubled, 2 ** (20 + i));
    let stepped = zlibCrc32(Buffer.alloc(0));
    for (let i = 0; i < 8192; i++) stepped = joinCrc32(stepped, mebibyte, 2 ** 20);
    expect(doubled).toBe(stepped);
    expect(cutTailCrc32(doubled, mebibyte, 2 ** 20)).toBe(
      joinCrc32(zlibCrc32(Buffer.alloc(0)), cutHeadCrc32(doubled, mebibyte, 2 ** 33 - 2 ** 20), 0),
    );
  });
});
