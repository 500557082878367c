import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Sha256, sha256Hex } from '#shared/pack/sha256.ts';

describe('Sha256', () => {
  // FIPS 180-4 example messages; the digests as GNU sha256sum 9.1 prints them.
  it.each([
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    [
      'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    ],
    ['a'.repeat(1_000_000), 'cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0'],
  ])('hashes the message of FIPS 180-4 (%#)', (message, digest) => {
    expect(sha256Hex(message)).toBe(digest);
  });

  it("agrees with OpenSSL's, however the bytes are cut", () => {
    const pieces = fc.array(fc.uint8Array({ maxLength: 150 }), { maxLength: 6 });
    fc.assert(
      fc.property(pieces, (parts) => {
        const ours = new Sha256();
        for (const part of parts) ours.update(part);
        expect(ours.digestHex()).toBe(
          createHash('sha256').update(Buffer.concat(parts)).digest('hex'),
        );
      }),
    );
  });
});
