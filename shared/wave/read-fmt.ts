import { maxChannels } from './format-limits.ts';
import type { UnreadableReason } from './track-format.ts';

/** What a `fmt ` chunk says, once its contradictions are settled. */
export type WaveEncoding = {
  encoding: 'pcm' | 'float';
  sampleRateHz: number;
  bits: number;
  containerBits: number;
  channels: number;
  channelMask: number | null;
};

export type FmtReading =
  | { kind: 'encoding'; encoding: WaveEncoding }
  /** A compressed format inside a WAV container. */
  | { kind: 'other'; tag: number }
  /** `at` counts from the start of the chunk's contents. */
  | { kind: 'impossible'; reason: UnreadableReason; at: number };

/** Format tags of Microsoft's mmreg.h. */
const tagPcm = 0x0001;
const tagFloat = 0x0003;
const tagExtensible = 0xfffe;

/** A GUID of WAVE_FORMAT_EXTENSIBLE is a format tag followed by one of these 14 bytes. */
const extensibleTails = [
  // KSDATAFORMAT_SUBTYPE_*, Microsoft's ksmedia.h
  '000000001000800000aa00389b71',
  // The B-format GUIDs of the ambisonic community, same tags
  '00002107d3118644c8c1ca000000',
];

/**
 * Reads the contents of a `fmt ` chunk: 16, 18 or 40 bytes and more.
 * blockAlign is believed only where the byte rate confirms it, because both are written wrongly
 * more often than channels and bits; then it tells a container wider than the bits need.
 */
export function readFmt(bytes: Uint8Array): FmtReading {
  if (bytes.length < 16)
    return { kind: 'impossible', reason: 'header-cut-short', at: bytes.length };
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const channels = view.getUint16(2, true);
  const sampleRateHz = view.getUint32(4, true);
  const byteRate = view.getUint32(8, true);
  const blockAlign = view.getUint16(12, true);
  const bitsPerSample = view.getUint16(14, true);
  let tag = view.getUint16(0, true);
  let validBits = bitsPerSample;
  let channelMask: number | null = null;

  if (tag === tagExtensible && bytes.length >= 40) {
    validBits = view.getUint16(18, true);
    channelMask = view.getUint32(20, true);
    tag = view.getUint16(24, true);
    const tail = Array.from(bytes.subarray(26, 40), (byte) => byte.toString(16).padStart(2, '0'));
    if (!extensibleTails.includes(tail.join(''))) {
      return { kind: 'impossible', reason: 'unsupported-encoding', at: 24 };
    }
  } else if (tag === tagExtensible) {
    // Cut before its sub-format: what fits the bits is the only guess that can be right.
    tag = bitsPerSample === 64 ? tagFloat : tagPcm;
  }

  if (tag !== tagPcm && tag !== tagFloat) return { kind: 'other', tag };
  if (channels === 0 || channels > maxChannels) {
    return { kind: 'impossible', reason: 'impossible-format', at: 2 };
  }
  if (sampleRateHz === 0) return { kind: 'impossible', reason: 'impossible-format', at: 4 };

  let containerBits = Math.ceil(bitsPerSample / 8) * 8;
  const alignedBits = (blockAlign / channels) * 8;
  if (byteRate === sampleRateHz * blockAlign && [8, 16, 24, 32, 64].includes(alignedBits)) {
    containerBits = Math.max(containerBits, alignedBits);
  }
  const encoding = tag === tagPcm ? 'pcm' : 'float';
  if (bitsPerSample === 0) return { kind: 'impossible', reason: 'impossible-format', at: 14 };
  const containers = encoding === 'pcm' ? [8, 16, 24, 32] : [32, 64];
  if (!containers.includes(containerBits)) {
    return { kind: 'impossible', reason: 'unsupported-encoding', at: 14 };
  }
  const bits =
    encoding === 'float'
      ? containerBits
      : validBits >= 1 && validBits <= containerBits
        ? validBits
        : containerBits;
  return {
    kind: 'encoding',
    encoding: { encoding, sampleRateHz, bits, containerBits, channels, channelMask },
  };
}
