/**
 * Programs that write to a pipe cannot come back to fill in the size of the audio, so they leave
 * 0, the largest number, or a large round one (sox: 0x7ffff000 in WAV and 0x7f000000 in AIFF, in
 * whole frames and with what stands before them). Nothing is promised then: the audio runs to the
 * end of the file. Zero is for the caller to judge: it may be meant.
 */
export function isStreamedSize(declaredBytes: number, available: number): boolean {
  if (declaredBytes === 0xffffffff || !Number.isSafeInteger(declaredBytes)) return true;
  if (declaredBytes <= available) return false;
  return roundSizes.some(([from, to]) => declaredBytes >= from && declaredBytes <= to);
}

const roundSizes = [
  [0x7efff000, 0x7f000010],
  [0x7fffe000, 0x80000000],
  [0xffffe000, 0xffffffff],
] as const;
