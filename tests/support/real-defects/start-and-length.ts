import { songSeconds } from '../good-sessions.ts';
import { ffmpeg, recording, sox } from '../real-sounds.ts';
import { placed, type RealDefect } from './real-defect.ts';

/** A file with a broadcast time stamp (bext), in frames. */
async function stamped(frames: number, sound: Promise<string>): Promise<string> {
  const bext = ['-write_bext', '1', '-metadata', `time_reference=${frames}`];
  return ffmpeg(await sound, [...bext, '-c:a', 'pcm_s24le']);
}

/** A sound that rings for nine seconds, from one second on. */
const ringing = () => placed('guit_em9', [], 2);

export const realStartAndLength = {
  'length-differs': {
    files: async () => ({
      // Only silence is missing at its end.
      'Organ.wav': await sox([await placed('tabla_tun2')], ['trim', '0', '8']),
      // Its end is missing while it rings.
      'Violin.wav': await sox(
        [await ringing()],
        ['trim', '0', '5', 'fade', 't', '0', '-0', '0.01'],
      ),
      // Its start is missing: it sounds at once, so its silent end proves nothing.
      'Trumpet.wav': await sox([await placed('tabla_tun1')], ['trim', '1']),
    }),
    found: [
      'note length-differs Organ',
      'look length-differs Trumpet',
      'look length-differs Violin',
      'look tail-cut Violin',
    ],
  },
  'start-differs': {
    alone: true,
    // 3,600 s at 48 kHz are 172,800,000 frames; two seconds more for the one that starts later.
    files: async () => ({
      'Bass.wav': await stamped(172_800_000, placed('bass_woodsy_c')),
      'Kick.wav': await stamped(172_800_000, placed('bd_haus')),
      'Piano.wav': await stamped(172_800_000, placed('ambi_piano', [], 2)),
      'Tabla.wav': await stamped(172_896_000, sox([await placed('tabla_tas2')], ['trim', '2'])),
      'Violin.wav': await stamped(172_896_000, placed('ambi_choir', [], 2)),
    }),
    found: [
      'must-fix length-differs Tabla',
      'look start-differs Tabla',
      'note start-differs Violin',
    ],
  },
  'not-consolidated': {
    alone: true,
    files: async () => ({
      'Bass.wav': await sox([recording('bass_thick_c')], ['gain', '-4']),
      'Choir.wav': await sox([recording('ambi_choir')], ['gain', '-4']),
      'Guitar.wav': await sox([recording('guit_em9')], ['gain', '-4']),
      'Kick.wav': await sox([recording('bd_haus')], ['gain', '-4']),
      'Lead Vocal.wav': await sox([recording('bass_voxy_c')], ['gain', '-4']),
      'Tabla.wav': await sox([recording('tabla_tun2')], ['gain', '-4']),
    }),
    found: ['must-fix not-consolidated Bass + Choir + Guitar + Kick + Lead Vocal + Tabla'],
  },
  'tail-cut': {
    files: async () => ({
      'Organ.wav': await sox(
        [await ringing()],
        ['trim', '0', '6', 'fade', 't', '0', '-0', '0.005', 'reverse'].concat([
          ...['pad', '0', String(songSeconds), 'trim', '0', String(songSeconds), 'reverse'],
        ]),
      ),
    }),
    found: ['look tail-cut Organ'],
  },
} satisfies Record<string, RealDefect>;
