/** What one byte does to the register, by the reflected polynomial of ISO 3309. */
const table = Uint32Array.from({ length: 256 }, (_, byte) => {
  let register = byte;
  for (let bit = 0; bit < 8; bit++) {
    register = register & 1 ? (register >>> 1) ^ 0xedb88320 : register >>> 1;
  }
  return register;
});

/** CRC-32 as in zip, a byte at a time. */
export function crc32(bytes: Uint8Array): number {
  let register = 0xffffffff;
  for (const byte of bytes) register = table[(register ^ byte) & 0xff]! ^ (register >>> 8);
  return ~register >>> 0;
}
