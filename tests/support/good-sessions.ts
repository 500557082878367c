import { inPairs } from './outside-programs.ts';
import { recording, sox } from './real-sounds.ts';

/**
 * One part of a good session: what it is called, the recording it is made of, its channels, and
 * after how many seconds the recording comes again (0: it is played once).
 */
type Part = readonly [name: string, recording: string, channels: 1 | 2, again: number];

/** Recordings without any fault we know of, named as a tidy person would. */
const parts: readonly Part[] = [
  ['Kick In', 'bd_haus', 1, 0.3],
  ['Kick Out', 'drum_heavy_kick', 1, 0.2],
  ['Snare Top', 'drum_snare_hard', 1, 0.7],
  ['Snare Bottom', 'drum_snare_soft', 1, 0.7],
  ['Hi-Hat', 'drum_cymbal_closed', 1, 0.3],
  ['Tom 1', 'drum_tom_hi_hard', 1, 1.5],
  ['Tom 2', 'drum_tom_lo_hard', 1, 1.2],
  ['Crash', 'drum_cymbal_hard', 1, 0],
  ['Bass', 'bass_woodsy_c', 1, 0.1],
  ['Synth Bass', 'bass_thick_c', 1, 0],
  ['Acoustic Guitar', 'guit_harmonics', 1, 0.2],
  ['Electric Guitar', 'guit_e_slide', 1, 0],
  ['Guitar Fifths', 'guit_e_fifths', 2, 0],
  ['Piano', 'ambi_piano', 2, 0.2],
  ['Synth Pad', 'ambi_glass_hum', 2, 0],
  ['Choir', 'ambi_choir', 2, 0.4],
  ['Drone', 'ambi_drone', 2, 0.2],
  ['Cowbell', 'drum_cowbell', 1, 0],
  ['Loop', 'loop_breakbeat', 2, 0],
  ['Vinyl Noise', 'vinyl_hiss', 2, 0],
  // Twenty so far; the rest makes it a large session.
  ['Kick Sub', 'bd_boom', 1, 0.6],
  ['Kick Sample', 'bd_fat', 1, 0.5],
  ['Snare Sample', 'sn_zome', 2, 0.5],
  ['Snare Layer', 'elec_mid_snare', 1, 0.9],
  ['Tom 3', 'drum_tom_mid_hard', 1, 1.9],
  ['Ride', 'drum_cymbal_soft', 1, 0.2],
  ['Splash', 'drum_splash_hard', 1, 0],
  ['Drum Roll', 'drum_roll', 1, 0],
  ['Tabla 1', 'tabla_tun1', 1, 0.3],
  ['Tabla 2', 'tabla_tas2', 1, 0.6],
  ['Tabla 3', 'tabla_na_o', 1, 0.4],
  ['Triangle', 'elec_triangle', 1, 0],
  ['Bells', 'perc_bell', 2, 0],
  ['Chimes', 'elec_chime', 1, 0],
  ['Door Slam', 'perc_door', 2, 0],
  ['Sub Bass', 'bass_trance_c', 2, 0],
  ['Bass Voxy', 'bass_voxy_c', 2, 0],
  ['Bass Drop', 'bass_drop_c', 2, 0],
  ['Guitar Chord', 'guit_em9', 2, 0],
  ['Guitar Twang', 'elec_twang', 2, 0.7],
  ['Organ', 'ambi_glass_rub', 2, 0],
  ['Synth Hum', 'ambi_haunted_hum', 2, 0],
  ['Ambience', 'ambi_lunar_land', 2, 0],
  ['Whoosh', 'ambi_dark_woosh', 2, 0],
  ['FX Robot', 'glitch_robot1', 2, 0],
  ['FX Boom', 'misc_cineboom', 2, 0],
  ['Percussion Loop', 'loop_perc1', 2, 0],
  ['Marimba', 'loop_safari', 2, 0],
];

/** How many of the parts are the clean ones every code has to stay silent on. */
export const cleanParts = 20;

/** All files are as long as this. */
export const songSeconds = 12;

/**
 * Makes the first `count` parts as tracks of one song: one second of silence, the part, silence
 * to the common end. 4 dB down, so that resampling cannot clip.
 */
export async function goodSession(count = parts.length): Promise<Record<string, string>> {
  const places = await inPairs(parts.slice(0, count), ([, name, channels, again]) =>
    sox(
      [recording(name)],
      [
        ...['gain', '-4', 'rate', '48000'],
        ...['remix', ...(channels === 1 ? ['1'] : ['1', '2'])],
        ...(again > 0 ? ['pad', '0', String(again), 'repeat', '40'] : []),
        // What would run on fades out before the end.
        ...['trim', '0', String(songSeconds - 2), 'fade', 't', '0', '-0', '0.5'],
        ...['pad', '1', String(songSeconds), 'trim', '0', String(songSeconds)],
      ],
    ),
  );
  return Object.fromEntries(
    places.map((place, index) => [`${parts[index]?.[0]}.wav`, place] as const),
  );
}
