import type { InstrumentEntry } from './entry.ts';

export const effects: readonly InstrumentEntry[] = [
  {
    written: 'Click',
    short: 'Clik',
    forms:
      'click, click track, clicktrack, clik, klick, clic, klick track, klickspur, metronome, metronom, metro, metronomo, claqueta, pista click, count in, count off, einzaehler',
    unsure: 'cue click, tempo click, clk, count',
    detail: 'Click',
  },
  {
    written: 'Riser',
    short: 'Rise',
    unsure: 'rise',
    forms:
      'riser, risers, uplifter, up lifter, build up, buildup fx, white noise riser, noise riser',
  },
  {
    written: 'Downlifter',
    short: 'DnLf',
    forms: 'downlifter, dn lf, down lifter, downer, downers, fall fx',
    unsure: 'down',
  },
  {
    written: 'Impact',
    short: 'Impt',
    unsure: 'boom, booms',
    forms: 'impact, impacts, impt, sub boom, sub drop, hit fx, fx hit, sub hit',
    detail: 'Impact',
  },
  { written: 'Sweep', short: 'Swp', forms: 'sweep, sweeps, swp, noise sweep, fx sweep' },
  { written: 'Whoosh', short: 'Whsh', forms: 'whoosh, whooshes, swoosh, woosh, whsh' },
  {
    written: 'Noise',
    short: 'Nois',
    forms:
      'noise, nois, white noise, pink noise, vinyl, vinyl crackle, crackle, vinyl noise, tape noise, tape hiss, hiss, rauschen, static',
    detail: 'Noise',
  },
  {
    written: 'Reverse',
    short: 'Rvs',
    forms: 'reverse fx, fx reverse, reverse sound, reversed fx',
    unsure: 'reverse, rvs, reversed',
    detail: 'Reverse',
  },
  {
    written: 'Reverb',
    short: 'Verb',
    forms:
      'reverb, verb, rvb, reverbs, hall reverb, plate reverb, room reverb, spring reverb, plate, plate verb, hall verb, room verb, spring verb, riverbero, nachhall',
    misspelt: 'revreb, rverb, revereb',
    unsure: 'rev, hall',
    detail: 'Reverb',
  },
  {
    written: 'Delay',
    short: 'Dly',
    forms:
      'delay, dly, dlay, delays, delay throw, delay throws, echo, echoes, ping pong, slap back, slapback delay, slap delay, tape delay, tape echo, throw delay, retardo',
    misspelt: 'deley, dealy',
    unsure: 'throw, throws',
    detail: 'Delay',
  },
  {
    written: 'Ambience',
    short: 'Amb',
    forms:
      'atmos, atmo, atmosphere, soundscape, field recording, field rec, nature sounds, room tone',
    unsure: 'ambience, amb, ambient, texture, textures',
    detail: 'Ambience',
  },
  { written: 'Foley', short: 'Foly', forms: 'foley, foly, footsteps' },
  { written: 'Crowd', short: 'Crwd', forms: 'crowd, crwd, audience, applause, publikum, publico' },
  {
    written: 'Turntable',
    short: 'TTbl',
    forms: 'turntable, turntables, dj scratch, dj scratches, scratches, t tbl',
  },
  { written: 'Swell', short: 'Swll', forms: 'swell, swells, swll', detail: 'Swell' },
  { written: 'Transition', short: 'Trns', forms: 'transition, transitions, trns' },
  { written: 'Glitch', short: 'Gltc', forms: 'glitch, glitches, gltc', detail: 'Glitch' },
  {
    written: 'Sample',
    short: 'Smpl',
    forms: 'fx sample, sampler',
    unsure: 'sample, samples, smpl, smp, samp',
    detail: 'Sample',
  },
  { written: 'Loop', short: 'Loop', forms: 'loop fx', unsure: 'loop, loops, lp', detail: 'Loop' },
  {
    written: 'FX',
    short: 'FX',
    forms:
      'fx, sfx, sound effect, sound effects, effect, effects, effekt, effekte, efx, efectos, effets, effetti, ear candy, earcandy, soundfx, fxs',
    detail: 'FX',
    general: true,
  },
];
