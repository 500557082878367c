import { boundedReader } from '../bytes/bounded-reader.ts';
import type { ByteSource } from '../bytes/byte-source.ts';
import { chunkId } from './walk-chunks.ts';

export type RecognisedAudio = { formatName: string; lossy: boolean };

/** How a format begins. `ask`: the music-metadata library can tell more about it. */
type Signature = {
  text: string;
  at?: number;
  formatName: string;
  lossy: boolean;
  ask?: boolean;
};

/** First bytes as published with each format; Latin-1 text. */
const signatures: readonly Signature[] = [
  { text: 'fLaC', formatName: 'FLAC', lossy: false, ask: true },
  { text: 'OggS', formatName: 'Ogg', lossy: true, ask: true },
  { text: 'ID3', formatName: 'MP3', lossy: true, ask: true },
  { text: 'ftyp', at: 4, formatName: 'MP4 audio', lossy: true, ask: true },
  { text: '\x30\x26\xb2\x75\x8e\x66\xcf\x11', formatName: 'WMA', lossy: true, ask: true },
  { text: 'MAC ', formatName: 'APE', lossy: false, ask: true },
  { text: 'wvpk', formatName: 'WavPack', lossy: false, ask: true },
  { text: 'MPCK', formatName: 'Musepack', lossy: true, ask: true },
  { text: 'MP+', formatName: 'Musepack', lossy: true, ask: true },
  { text: 'DSD ', formatName: 'DSD', lossy: false },
  { text: 'FRM8', formatName: 'DSD', lossy: false },
  { text: 'TTA1', formatName: 'TTA', lossy: false },
  { text: 'tBaK', formatName: 'TAK', lossy: false },
  { text: 'ajkg', formatName: 'Shorten', lossy: false },
  { text: 'OFR ', formatName: 'OFR', lossy: false },
  { text: '#!AMR', formatName: 'AMR', lossy: true },
  { text: '\x0b\x77', formatName: 'AC-3', lossy: true },
  { text: '\x7f\xfe\x80\x01', formatName: 'DTS', lossy: true },
  // Plain samples in containers that are not measured.
  { text: 'RIFX', formatName: 'big-endian WAV (RIFX)', lossy: false },
  { text: 'riff\x2e\x91\xcf\x11', formatName: 'Wave64', lossy: false },
  { text: 'caff', formatName: 'CAF', lossy: false },
  { text: '.snd', formatName: 'AU', lossy: false },
];

/** Matroska and WebM: usually video, sometimes only sound. */
const ebml = '\x1a\x45\xdf\xa3';

/**
 * Recognises audio that is not measured by its own bytes. `claimsAudio` (the name says so) lets
 * the library look at files that begin like nothing known, too. null: no audio.
 * Never throws for what the file holds; throws what the source throws.
 */
export async function recogniseAudio(
  source: ByteSource,
  claimsAudio: boolean,
): Promise<RecognisedAudio | null> {
  const start = await source.read(0, Math.min(source.size, 4096));
  const begins = (text: string, at = 0): boolean =>
    [...text].every((character, index) => start[at + index] === character.charCodeAt(0));
  if (begins('MThd')) return null;
  if (begins('ftyp', 4) && isImageBrand(chunkId(start, 8))) return null;
  const signature = signatures.find(({ text, at }) => begins(text, at));
  if (signature && !signature.ask) return refinePlain(signature, start);
  if (signature || begins(ebml) || isMpegStream(start) || claimsAudio) {
    const answer = await askLibrary(source);
    if (answer === 'no-audio') return null;
    if (answer) return answer;
    if (signature) return signature;
    if (isMpegStream(start)) return { formatName: 'MP3', lossy: true };
  }
  return null;
}

/** Photos come in the same container as music: the brand tells (ISO 14496-12, MIAF). */
function isImageBrand(brand: string): boolean {
  return ['heic', 'heix', 'heim', 'heis', 'hevc', 'mif1', 'msf1', 'avif', 'avis'].includes(brand);
}

/** CAF names its coding at byte 28, AU has a number for it at byte 12. */
function refinePlain({ text, formatName, lossy }: Signature, start: Uint8Array): RecognisedAudio {
  if (text === 'caff') {
    return { formatName, lossy: !['lpcm', 'alac', 'flac'].includes(chunkId(start, 28)) };
  }
  // 1 is µ-law, 23 to 26 are ADPCM, 27 is A-law; the others are plain numbers.
  if (text === '.snd') {
    const coding = start[15] ?? 0;
    return { formatName, lossy: coding === 1 || (coding >= 23 && coding <= 27) };
  }
  return { formatName, lossy };
}

/** Bit rates in kbit/s by index (ISO 11172-3 table 3-B.2 and ISO 13818-3). */
const mpegRates = {
  mpeg1layer2: [0, 32, 48, 56, 64, 80, 96, 112, 128, 160, 192, 224, 256, 320, 384],
  mpeg1layer3: [0, 32, 40, 48, 56, 64, 80, 96, 112, 128, 160, 192, 224, 256, 320],
  mpeg2: [0, 8, 16, 24, 32, 40, 48, 56, 64, 80, 96, 112, 128, 144, 160],
} as const;

/** Length in bytes of the MPEG layer 2 or 3 or ADTS AAC frame at `at`; 0 where there is none. */
function mpegFrameBytes(bytes: Uint8Array, at: number): number {
  const [b0 = 0, b1 = 0, b2 = 0, b3 = 0, b4 = 0, b5 = 0] = bytes.subarray(at, at + 6);
  if (b0 !== 0xff) return 0;
  if ((b1 & 0xf6) === 0xf0) return ((b3 & 3) << 11) | (b4 << 3) | (b5 >> 5);
  const version = (b1 >> 3) & 3;
  const layerBits = (b1 >> 1) & 3;
  if ((b1 & 0xe0) !== 0xe0 || version === 1 || layerBits === 0 || layerBits === 3) return 0;
  const isMpeg1 = version === 3;
  const isLayer2 = layerBits === 2;
  const kbits = !isMpeg1 ? 'mpeg2' : isLayer2 ? 'mpeg1layer2' : 'mpeg1layer3';
  const kbit = mpegRates[kbits][b2 >> 4] ?? 0;
  const baseRate = [44100, 48000, 32000][(b2 >> 2) & 3];
  if (kbit === 0 || baseRate === undefined) return 0;
  const sampleRateHz = baseRate / (isMpeg1 ? 1 : version === 2 ? 2 : 4);
  const samplesPerByte = isMpeg1 || isLayer2 ? 144 : 72;
  return Math.floor((samplesPerByte * kbit * 1000) / sampleRateHz) + ((b2 >> 1) & 1);
}

/**
 * A stream without any header: two frames in a row, because one alone is also the byte order
 * mark of a text or the start of a photo.
 */
function isMpegStream(start: Uint8Array): boolean {
  const first = mpegFrameBytes(start, 0);
  return first > 6 && mpegFrameBytes(start, first) > 6;
}

/** The library may not read more than this to find out what a file is. */
const libraryBudgetBytes = 4 * 1024 * 1024;

/**
 * Loaded only when a folder holds such a file, because it is large. It reads through the few
 * members of a Blob it uses, so that its reads stay bounded too. undefined: it does not know.
 */
async function askLibrary(source: ByteSource): Promise<RecognisedAudio | 'no-audio' | undefined> {
  const { parseBlob } = await import('music-metadata');
  const reader = boundedReader(source);
  let left = libraryBudgetBytes;
  let failure: unknown;
  const blob = {
    size: source.size,
    type: '',
    slice: (from: number, to: number) => ({
      async arrayBuffer() {
        left -= to - from;
        if (left < 0) throw new RangeError('enough was read to tell');
        const bytes = await reader.readUpTo(from, to - from, to - from).catch((error: unknown) => {
          failure = error;
          throw error;
        });
        return new Uint8Array(bytes).buffer;
      },
    }),
  };
  let format: LibraryFormat = {};
  try {
    const metadata = await parseBlob(blob, {
      duration: false,
      skipCovers: true,
      skipPostHeaders: true,
      observer: (event) => {
        format = { ...event.metadata.format };
      },
    });
    format = metadata.format;
  } catch {
    // What it found before it gave up is still good; an error of the source is the caller's.
    if (failure !== undefined) throw failure as Error;
  }
  return nameFormat(format);
}

type LibraryFormat = {
  container?: string | undefined;
  codec?: string | undefined;
  lossless?: boolean | undefined;
  hasAudio?: boolean | undefined;
  hasVideo?: boolean | undefined;
};

/** The library's words for codings, and ours, the most telling first. */
const codingNames: readonly (readonly [RegExp, string, lossy?: boolean])[] = [
  [/^MPEG [\d.]+ Layer 3/i, 'MP3', true],
  [/^MPEG [\d.]+ Layer [12]/i, 'MPEG layer 1 or 2', true],
  [/alac/i, 'ALAC', false],
  [/flac/i, 'FLAC', false],
  [/opus/i, 'Opus', true],
  [/vorbis/i, 'Ogg Vorbis', true],
  [/speex/i, 'Speex', true],
  [/aac/i, 'AAC', true],
  [/ac-?3/i, 'AC-3', true],
  [/Windows Media Audio.*lossless/i, 'WMA Lossless', false],
  [/Windows Media Audio/i, 'WMA', true],
];

function nameFormat(format: LibraryFormat): RecognisedAudio | 'no-audio' | undefined {
  const { container = '', codec = '', lossless, hasAudio, hasVideo } = format;
  // A film is nothing to mix, with or without sound.
  if (hasVideo || hasAudio === false) return 'no-audio';
  for (const [pattern, formatName, lossy] of codingNames) {
    if (pattern.test(codec)) return { formatName, lossy: lossy ?? lossless !== true };
  }
  if (/wavpack/i.test(container)) return { formatName: 'WavPack', lossy: lossless === false };
  if (/monkey/i.test(container)) return { formatName: 'APE', lossy: false };
  if (/musepack/i.test(container)) return { formatName: 'Musepack', lossy: true };
  if (/asf/i.test(container)) return { formatName: 'WMA', lossy: lossless !== true };
  return undefined;
}
