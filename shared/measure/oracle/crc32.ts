/** CRC-32 as in zip (ISO 3309), one bit at a time. */
export function crc32(bytes: Uint8Array): number {
  let register = 0xffffffff;
  for (const byte of bytes) {
    register ^= byte;
    for (let bit = 0; bit < 8; bit++) {
      register = register & 1 ? (register >>> 1) ^ 0xedb88320 : register >>> 1;
    }
  }
  return ~register >>> 0;
}
