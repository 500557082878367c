/** Sounds for the sample session, all worked out here: no recording is in the product. */

export const sampleRateHz = 48_000;

/** A repeatable stream of numbers from -1 to 1 (a linear congruential generator, ANSI C's constants). */
export function noiseSource(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1_103_515_245) + 12_345) >>> 0;
    return state / 0x8000_0000 - 1;
  };
}

const frames = (seconds: number): number => Math.round(seconds * sampleRateHz);

/** Adds a sound at a moment; what would run past the end is cut. */
export function place(
  track: Float32Array,
  sound: Float32Array,
  atSeconds: number,
  level = 1,
): void {
  const start = frames(atSeconds);
  const length = Math.min(sound.length, track.length - start);
  for (let i = 0; i < length; i++) track[start + i]! += sound[i]! * level;
}

/** A drum skin: a tone that falls in pitch and dies away, with a short knock in front. */
export function drum(fromHz: number, toHz: number, seconds: number, knock: number): Float32Array {
  const sound = new Float32Array(frames(seconds));
  const noise = noiseSource(fromHz);
  let phase = 0;
  for (let i = 0; i < sound.length; i++) {
    const t = i / sampleRateHz;
    phase += (2 * Math.PI * (toHz + (fromHz - toHz) * Math.exp(-t * 28))) / sampleRateHz;
    const rise = Math.min(1, t / 0.002);
    sound[i] =
      rise *
      (Math.sin(phase) * Math.exp(-t * (5 / seconds)) + knock * noise() * Math.exp(-t * 220));
  }
  return sound;
}

/** Wires, cymbals, tambourines: noise that dies away, the lower part taken out by differencing. */
export function rattle(seconds: number, brightness: number, seed: number): Float32Array {
  const sound = new Float32Array(frames(seconds));
  const noise = noiseSource(seed);
  let previous = 0;
  for (let i = 0; i < sound.length; i++) {
    const t = i / sampleRateHz;
    const white = noise();
    sound[i] =
      (white - brightness * previous) * 0.5 * Math.min(1, t / 0.001) * Math.exp((-t * 5) / seconds);
    previous = white;
  }
  return sound;
}

/** A plucked string after Karplus and Strong (Computer Music Journal 7(2), 1983). */
export function pluck(hz: number, seconds: number, damping: number, seed: number): Float32Array {
  const sound = new Float32Array(frames(seconds));
  const period = Math.max(2, Math.round(sampleRateHz / hz));
  const noise = noiseSource(seed);
  const string = Float32Array.from({ length: period }, () => noise());
  // The burst is rounded off first, as a fingertip does.
  for (let pass = 0; pass < 4; pass++)
    for (let i = 0; i < period; i++) string[i] = (string[i]! + string[(i + 1) % period]!) / 2;
  const release = frames(0.04);
  for (let i = 0; i < sound.length; i++) {
    const at = i % period;
    const next = (at + 1) % period;
    sound[i] = string[at]! * Math.min(1, i / 48, (sound.length - i) / release);
    string[at] = damping * 0.5 * (string[at]! + string[next]!);
  }
  return sound;
}

/** A held note from a few partials, with soft edges and a slow beating between two of them. */
export function pad(hz: number, seconds: number, detuneHz: number): Float32Array {
  const sound = new Float32Array(frames(seconds));
  const edge = frames(0.35);
  for (let partial = 1; partial <= 6; partial++) {
    const step = (2 * Math.PI * (hz * partial + detuneHz)) / sampleRateHz;
    for (let i = 0; i < sound.length; i++) sound[i]! += Math.sin(step * i + partial) / partial / 3;
  }
  for (let i = 0; i < sound.length; i++) {
    sound[i]! *= Math.min(1, i / edge, (sound.length - i) / edge);
  }
  return sound;
}

/**
 * A sung vowel: a pulse train with vibrato through three resonances (two-pole filters) at the
 * formants of an open "ah".
 */
export function voice(hz: number, seconds: number, vibrato: number, seed: number): Float32Array {
  const sound = new Float32Array(frames(seconds));
  const noise = noiseSource(seed);
  const resonators = [
    [700, 90, 1],
    [1150, 110, 0.6],
    [2700, 170, 0.25],
  ].map(([centreHz, widthHz, gain]) => resonator(centreHz!, widthHz!, gain!));
  let phase = 0;
  const edge = frames(0.06);
  for (let i = 0; i < sound.length; i++) {
    const t = i / sampleRateHz;
    const sway = 1 + vibrato * Math.min(1, t * 2) * Math.sin(2 * Math.PI * 5.2 * t);
    phase += (hz * sway) / sampleRateHz;
    if (phase >= 1) phase -= 1;
    const breath = noise() * 0.02;
    const source = (phase < 0.4 ? Math.sin((Math.PI * phase) / 0.4) - 0.6 : -0.6) + breath;
    const sung = resonators.reduce((sum, filter) => sum + filter(source), 0);
    sound[i] = sung * 0.02 * Math.min(1, i / edge, (sound.length - i) / edge);
  }
  return sound;
}

function resonator(centreHz: number, widthHz: number, gain: number): (x: number) => number {
  const radius = Math.exp((-Math.PI * widthHz) / sampleRateHz);
  const a1 = 2 * radius * Math.cos((2 * Math.PI * centreHz) / sampleRateHz);
  const a2 = -radius * radius;
  let y1 = 0;
  let y2 = 0;
  return (x) => {
    const y = x + a1 * y1 + a2 * y2;
    y2 = y1;
    y1 = y;
    return y * gain;
  };
}

/** Rests on its middle line (a first-order high-pass at 15 Hz) and peaks at `peak` (full scale = 1). */
export function finish(track: Float32Array, peak: number): Float32Array {
  const keep = Math.exp((-2 * Math.PI * 15) / sampleRateHz);
  const centred = new Float32Array(track.length);
  let before = 0;
  let highest = 0;
  for (let i = 0; i < track.length; i++) {
    centred[i] = keep * ((i === 0 ? 0 : centred[i - 1]!) + track[i]! - before);
    before = track[i]!;
    highest = Math.max(highest, Math.abs(centred[i]!));
  }
  return highest === 0 ? centred : centred.map((sample) => (sample / highest) * peak);
}

/** Fades to silence over a second that ends `restSeconds` before the end. */
export function ringOut(track: Float32Array, restSeconds: number): Float32Array {
  const end = track.length - frames(restSeconds);
  const fade = frames(1);
  return track.map((sample, i) => sample * Math.max(0, Math.min(1, (end - i) / fade)));
}
