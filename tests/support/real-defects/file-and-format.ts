import { copyFileSync, existsSync, truncateSync } from 'node:fs';
import { quietRules } from '../finding-cases/finding-case.ts';
import { ffmpeg, make, made, recording, sox } from '../real-sounds.ts';
import { inSong, placed, type RealDefect } from './real-defect.ts';

/** A copy of a file of which only the first bytes are there. */
async function cutAfter(bytes: number, whole: Promise<string>): Promise<string> {
  const place = (await whole).replace('.wav', `-${bytes}.wav`);
  if (!existsSync(place)) {
    copyFileSync(await whole, place);
    truncateSync(place, bytes);
  }
  return place;
}

const organ = () => placed('ambi_glass_rub', [], 2);

export const realFileAndFormat = {
  unreadable: {
    files: async () => ({ 'Organ.wav': await cutAfter(30, organ()) }),
    found: ['must-fix unreadable Organ'],
  },
  'cut-short': {
    files: async () => ({ 'Organ.wav': await cutAfter(1_000_000, organ()) }),
    // It ends in the middle of its sound, and is shorter than the others by that.
    found: [
      'must-fix cut-short Organ',
      'look length-differs Organ',
      'look tail-cut Organ',
      'look ends-on-sound Organ',
    ],
  },
  'not-wav': {
    files: async () => ({
      'Organ.aiff': await make('sox', ['-V1', '-D', await organ(), made], 'aiff'),
      'Violin.flac': recording('ambi_choir'),
    }),
    found: ['note not-wav Organ', 'must-fix not-wav Violin'],
  },
  lossy: {
    files: async () => ({
      'Organ.mp3': await ffmpeg(await organ(), ['-b:a', '192k'], 'mp3'),
      'Violin.ogg': await ffmpeg(await organ(), ['-c:a', 'libvorbis'], 'ogg'),
    }),
    found: ['must-fix lossy Organ', 'must-fix lossy Violin'],
  },
  'sample-rate-differs': {
    files: async () => ({
      'Organ.wav': await make('sox', ['-V1', '-D', await organ(), '-r', '44100', made]),
    }),
    found: ['must-fix sample-rate-differs Organ'],
  },
  'wrong-speed': {
    // Converted to 44.1 kHz, then labelled 48 kHz without another conversion.
    files: async () => {
      const slower = await make('sox', ['-V1', '-D', await organ(), '-r', '44100', made]);
      return { 'Organ.wav': await make('sox', ['-V1', '-D', '-r', '48000', slower, made]) };
    },
    found: ['must-fix wrong-speed Organ'],
  },
  'sample-rate-not-allowed': {
    files: () => Promise.resolve({}),
    rules: { ...quietRules, format: { ...quietRules.format, sampleRatesHz: [96_000] } },
    found: ['look sample-rate-not-allowed *'],
  },
  'bit-depth-low': {
    files: async () => ({
      'Organ.wav': await make('sox', ['-V1', '-D', await organ(), '-b', '16', made]),
    }),
    rules: { ...quietRules, levels: {}, names: quietRules.names },
    found: ['must-fix bit-depth-low Organ', 'note bit-depth-differs Organ'],
  },
  'bit-depth-differs': {
    files: async () => ({
      'Organ.wav': await ffmpeg(await organ(), ['-c:a', 'pcm_f32le']),
    }),
    found: ['note bit-depth-differs Organ'],
  },
  'empty-bits': {
    files: async () => {
      const sixteen = await make('sox', ['-V1', '-D', await organ(), '-b', '16', made]);
      return { 'Organ.wav': await sox([sixteen], []) };
    },
    found: ['note empty-bits Organ'],
  },
  'too-many-channels': {
    files: async () => {
      const inputs = ['ambi_choir', 'ambi_piano', 'ambi_glass_rub'].map(recording);
      return { 'Organ.wav': await sox(['-M', ...inputs], ['gain', '-4', ...inSong]) };
    },
    found: ['note too-many-channels Organ'],
  },
  'dual-mono': {
    files: async () => ({
      'Organ.wav': await placed('tabla_na_o', ['remix', '1', '1'], 1),
      'Violin.wav': await placed('tabla_tun2', ['remix', '1', '1v0.5'], 1),
    }),
    found: ['look dual-mono Organ', 'look dual-mono Violin'],
  },
  'sides-cancel': {
    files: async () => ({ 'Organ.wav': await placed('tabla_tun2', ['remix', '1', '1i'], 1) }),
    found: ['must-fix sides-cancel Organ'],
  },
  'one-side-silent': {
    files: async () => ({ 'Organ.wav': await placed('tabla_tun2', ['remix', '1', '0'], 1) }),
    found: ['look one-side-silent Organ'],
  },
  'split-stereo': {
    files: async () => ({
      'Marimba L.wav': await sox([await placed('loop_safari', [], 2)], ['remix', '1']),
      'Marimba R.wav': await sox([await placed('loop_safari', [], 2)], ['remix', '2']),
    }),
    found: ['note split-stereo Marimba L + Marimba R'],
  },
} satisfies Record<string, RealDefect>;
