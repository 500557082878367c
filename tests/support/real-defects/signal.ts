import { quietRules } from '../finding-cases/finding-case.ts';
import { songSeconds } from '../good-sessions.ts';
import { ffmpeg, make, made, sox } from '../real-sounds.ts';
import { inSong, placed, type RealDefect } from './real-defect.ts';

const float = ['-c:a', 'pcm_f32le'];
const song = String(songSeconds);

export const realSignal = {
  clipped: {
    files: async () => ({
      // Too loud at the export, into full scale.
      'Lead Vocal.wav': await placed('ambi_piano', ['norm', '3'], 2),
      // Too loud at the recording, turned down afterwards.
      'Violin.wav': await placed('guit_em9', ['norm', '3', 'gain', '-5'], 2),
      'Snare Sample.wav': await placed('sn_zome', ['norm', '3', 'gain', '-2'], 2),
    }),
    found: ['must-fix clipped Lead Vocal', 'look clipped Snare Sample', 'must-fix clipped Violin'],
  },
  'flat-tops': {
    files: async () => ({
      'Synth Lead.wav': await make('sox', [
        ...['-V1', '-D', '-n', '-b', '24', '-r', '48000', '-c', '1', made],
        ...['synth', '8', 'square', '220', 'gain', '-9', 'fade', 't', '0.01', '8', '0.01'],
        ...inSong,
      ]),
      'Electric Guitar Fuzz.wav': await placed('guit_e_slide', ['norm', '40', 'gain', '-6']),
    }),
    found: ['note flat-tops Electric Guitar Fuzz', 'note flat-tops Synth Lead'],
  },
  'over-full-scale': {
    files: async () => ({
      'Organ.wav': await ffmpeg(await placed('ambi_glass_rub', ['norm', '-1'], 2), [
        ...['-af', 'volume=6dB:precision=float', ...float],
      ]),
    }),
    found: ['note bit-depth-differs Organ', 'note over-full-scale Organ'],
  },
  'between-sample-over': {
    files: async () => ({ 'Organ.wav': await placed('elec_triangle', ['norm', '-0.1']) }),
    rules: {
      ...quietRules,
      levels: { ...quietRules.levels, 'between-sample-over': { level: 'look' } },
    },
    found: ['look between-sample-over Organ', 'note above-ceiling Organ'],
  },
  'above-ceiling': {
    files: async () => ({ 'Organ.wav': await placed('ambi_glass_rub', ['norm', '-0.5'], 2) }),
    found: ['note above-ceiling Organ'],
  },
  'starts-on-sound': {
    files: async () => ({
      'Organ.wav': await sox(
        [await placed('guit_em9', [], 2)],
        ['trim', '2', 'pad', '0', song, 'trim', '0', song],
      ),
    }),
    found: ['look starts-on-sound Organ'],
  },
  'ends-on-sound': {
    files: async () => ({
      'Organ.wav': await sox(
        [await placed('guit_em9', [], 2)],
        ['trim', '0', '5', 'reverse', 'pad', '0', song, 'trim', '0', song, 'reverse'],
      ),
    }),
    found: ['look tail-cut Organ', 'look ends-on-sound Organ'],
  },
  dropout: {
    files: async () => ({
      // 20 ms of nothing pushed into the sound.
      'Organ.wav': await placed('guit_em9', ['pad', '0.02@2.5'], 2),
      'Violin.wav': await placed('ambi_haunted_hum', ['pad', '0.03@4'], 2),
      'Trumpet.wav': await placed('bass_voxy_c', ['pad', '0.03@4'], 2),
    }),
    found: ['look dropout Organ', 'must-fix dropout Trumpet', 'must-fix dropout Violin'],
  },
  silent: {
    files: async () => ({ 'Organ.wav': await placed('guit_em9', ['vol', '0'], 2) }),
    found: ['look silent Organ'],
  },
  'nearly-silent': {
    files: async () => ({ 'Organ.wav': await placed('guit_em9', ['norm', '-70'], 2) }),
    found: ['look nearly-silent Organ'],
  },
  'dc-offset': {
    files: async () => ({
      'Organ.wav': await sox(
        [await placed('guit_em9', [], 2)],
        ['gain', '-3', 'dcshift', '0.02', 'fade', 't', '0.2', song, '0.2'],
      ),
    }),
    found: ['look dc-offset Organ'],
  },
  'same-audio': {
    files: async () => ({
      'Organ.wav': await placed('loop_safari', [], 2),
      'Organ Copy.aiff': await make(
        'sox',
        ['-V1', '-D', await placed('loop_safari', [], 2), made],
        'aiff',
      ),
      'Tabla 1.wav': await placed('tabla_tun2'),
      'Tabla 2.wav': await placed('tabla_tun2', ['gain', '-7', 'pad', '0.25']),
    }),
    found: [
      'note not-wav Organ Copy',
      'note export-leftover Organ Copy',
      'look same-audio Organ Copy + Organ',
      'note same-audio Tabla 1 + Tabla 2',
    ],
  },
  'polarity-twin': {
    files: async () => ({
      'Tabla Top.wav': await placed('tabla_tun2'),
      'Tabla Bottom.wav': await placed('tabla_tun2', ['vol', '-0.8']),
    }),
    found: ['note polarity-twin Tabla Bottom + Tabla Top'],
  },
  'not-a-number': {
    files: async () => ({
      'Organ.wav': await ffmpeg(await placed('tabla_tun2', ['repeat', '3']), [
        ...['-af', "aeval='if(between(t,3,3.0005),0/0,val(0))'", ...float],
      ]),
    }),
    found: ['note bit-depth-differs Organ', 'must-fix not-a-number Organ'],
  },
} satisfies Record<string, RealDefect>;
