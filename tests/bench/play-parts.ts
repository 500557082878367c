/**
 * Something like a band, made from nothing: each part is a function that plays into a phrase of
 * mono samples at 48 kHz. Enough of music's habits (attacks, decays, rests, noise, low notes,
 * chords) that meters have their usual work with it.
 */

const rate = 48_000;
/** Frames of a sixteenth at 112 beats a minute. */
const step = Math.round((60 / 112 / 4) * rate);
const steps = 128;

/** Eight bars: about 17 seconds. */
export const phraseFrames = step * steps;

type Random = () => number;

/** Evenly distributed between 0 and 1. */
export function randomFrom(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** Adds `sound` from `start` on for at most `frames`; what hangs over the end is cut. */
function add(phrase: Float32Array, start: number, frames: number, sound: (i: number) => number) {
  const end = Math.min(phrase.length, start + frames);
  for (let i = start; i < end; i++) phrase[i]! += sound(i - start);
}

function kick(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 4) {
    const start = beat * step;
    const force = 0.5 + 0.15 * random();
    let phase = 0;
    add(phrase, start, 0.35 * rate, (i) => {
      phase += (2 * Math.PI * (48 + 110 * Math.exp(-i / 900))) / rate;
      return force * Math.exp(-i / 5200) * Math.sin(phase);
    });
  }
}

function snare(phrase: Float32Array, random: Random): void {
  for (let beat = 4; beat < steps; beat += 8) {
    const force = 0.3 + 0.1 * random();
    add(phrase, beat * step, 0.3 * rate, (i) => {
      const rattle = (random() - 0.5) * Math.exp(-i / 3800);
      return (
        force * (rattle + 0.6 * Math.exp(-i / 2400) * Math.sin((2 * Math.PI * 190 * i) / rate))
      );
    });
  }
}

function cymbals(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 2) {
    const decay = beat % 32 === 30 ? 14_000 : 1300;
    const force = 0.12 + 0.08 * random();
    let before = 0;
    add(phrase, beat * step, 6 * decay, (i) => {
      const hiss = random() - 0.5;
      const bright = hiss - before;
      before = hiss;
      return force * bright * Math.exp(-i / decay);
    });
  }
}

function bass(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 4) {
    if (random() < 0.15) continue;
    const hertz = 41.2 * 2 ** ([0, 0, 5, 7, 3][Math.floor(random() * 5)]! / 12);
    let low = 0;
    add(phrase, beat * step, 3.6 * step, (i) => {
      const saw = 2 * ((i * hertz) / rate - Math.floor((i * hertz) / rate)) - 1;
      low += 0.04 * (saw - low);
      const ends = Math.min(1, i / 200, (3.6 * step - i) / 400);
      return 0.55 * low * ends;
    });
  }
}

/** A string that is plucked and loses its brightness. */
function guitar(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 3) {
    const period = Math.round(rate / (110 * 2 ** (Math.floor(random() * 24) / 12)));
    const string = Float32Array.from({ length: period }, () => 0.5 * (random() - 0.5));
    let at = 0;
    add(phrase, beat * step, 1.2 * rate, () => {
      const next = (at + 1) % period;
      string[at] = 0.498 * (string[at]! + string[next]!);
      at = next;
      return string[at]!;
    });
  }
}

function keys(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 8) {
    for (const interval of [0, 4, 7, 11]) {
      const hertz = 220 * 2 ** ((interval + Math.floor(random() * 3)) / 12);
      add(phrase, beat * step, 2 * rate, (i) => {
        const time = i / rate;
        const bell = Math.sin(2 * Math.PI * 2 * hertz * time) * Math.exp(-time * 5);
        return 0.09 * Math.exp(-time * 1.6) * Math.sin(2 * Math.PI * hertz * time + bell);
      });
    }
  }
}

function pad(phrase: Float32Array, random: Random): void {
  for (const interval of [0, 3, 7, 12]) {
    const hertz = 130.8 * 2 ** (interval / 12) * (1 + 0.002 * random());
    const start = 2 * Math.PI * random();
    add(phrase, 0, phrase.length, (i) => {
      const swell = 0.5 - 0.5 * Math.cos((2 * Math.PI * i) / phrase.length);
      return 0.08 * swell * Math.sin((2 * Math.PI * hertz * i) / rate + start);
    });
  }
}

/** Lines with a breath between them, a wavering pitch, and air. */
function voice(phrase: Float32Array, random: Random): void {
  for (let beat = 0; beat < steps; beat += 16) {
    const length = (9 + 4 * random()) * step;
    let phase = 0;
    const hertz = 196 * 2 ** (Math.floor(random() * 8) / 12);
    add(phrase, beat * step, length, (i) => {
      phase +=
        (2 * Math.PI * hertz * (1 + 0.008 * Math.sin((2 * Math.PI * 5.5 * i) / rate))) / rate;
      const ends = Math.min(1, i / 3000, (length - i) / 6000);
      const tone = Math.sin(phase) + 0.6 * Math.sin(2 * phase) + 0.35 * Math.sin(5 * phase);
      return 0.17 * ends * (tone + 0.12 * (random() - 0.5));
    });
  }
}

/** Hiss of a room and a microphone, as recorded tracks have it. */
function room(phrase: Float32Array, random: Random): void {
  add(phrase, 0, phrase.length, () => 0.0002 * (random() - 0.5));
}

const players = { kick, snare, cymbals, bass, guitar, keys, pad, voice };

export const partNames = Object.keys(players) as (keyof typeof players)[];

/** One phrase of a part; another seed plays it otherwise. */
export function playPart(name: keyof typeof players, seed: number): Float32Array {
  const phrase = new Float32Array(phraseFrames);
  const random = randomFrom(seed);
  players[name](phrase, random);
  // Programmed parts are silent between notes, recorded ones are not.
  if (name !== 'pad' && name !== 'keys') room(phrase, random);
  return phrase;
}
