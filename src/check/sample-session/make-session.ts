import {
  drum,
  finish,
  noiseSource,
  pad,
  place,
  pluck,
  rattle,
  ringOut,
  sampleRateHz,
  voice,
} from './synthesis.ts';
import { sampleSong } from './sample-song.ts';
import { writeWav } from './write-wav.ts';

/** Twelve bars of an invented song, with a fault planted in most of its files. */
const bars = 12;
const beat = 60 / sampleSong.bpm;
const bar = 4 * beat;
const length = Math.round(bars * bar * sampleRateHz);

/** Roots of the chords, one a bar, in hertz. */
const roots = [110, 110, 87.31, 98] as const;
const root = (index: number): number => roots[index % roots.length]!;

/** As a part leaves the studio: centred, at its level, rung out before the end. */
const mastered = (track: Float32Array, peak: number): Float32Array =>
  ringOut(finish(track, peak), 0.2);

const emptyTrack = (): Float32Array => new Float32Array(length);

function everyBeat(
  play: (track: Float32Array, at: number, beatInBar: number, barIndex: number) => void,
): Float32Array {
  const track = emptyTrack();
  for (let barIndex = 0; barIndex < bars; barIndex++)
    for (let beatInBar = 0; beatInBar < 4; beatInBar++)
      play(track, barIndex * bar + beatInBar * beat + 0.01, beatInBar, barIndex);
  return track;
}

function kick(): Float32Array {
  const hit = drum(160, 52, 0.32, 0.4);
  return everyBeat((track, at, beatInBar) => {
    if (beatInBar % 2 === 0) place(track, hit, at);
    else place(track, hit, at + beat * 0.75, 0.5);
  });
}

function snare(): Float32Array {
  const skin = drum(240, 185, 0.2, 0.3);
  const wires = rattle(0.24, 0.4, 7);
  return everyBeat((track, at, beatInBar) => {
    if (beatInBar % 2 === 0) return;
    place(track, skin, at, 0.7);
    place(track, wires, at, 0.8);
  });
}

function overhead(seed: number, parts: readonly Float32Array[]): Float32Array {
  const ride = rattle(0.3, 0.97, seed);
  const room = noiseSource(seed);
  const track = everyBeat((into, at) => {
    place(into, ride, at, 0.5);
    place(into, ride, at + beat / 2, 0.3);
  });
  for (const part of parts) for (let i = 0; i < length; i++) track[i]! += part[i]! * 0.25;
  // The hiss of a room, far down: real microphones are never silent.
  for (let i = 0; i < length; i++) track[i]! += room() * 0.0004;
  return track;
}

function bass(): Float32Array {
  return everyBeat((track, at, beatInBar, barIndex) => {
    const hz = root(barIndex) / 2;
    place(track, pluck(beatInBar === 3 ? hz * 1.5 : hz, beat * 0.95, 0.997, 40 + beatInBar), at, 1);
  });
}

function guitar(seed: number, lag: number): Float32Array {
  return everyBeat((track, at, beatInBar, barIndex) => {
    if (barIndex >= 5 && barIndex < 7) return;
    for (const [string, ratio] of [1, 1.5, 2, 2.5].entries())
      place(
        track,
        pluck(root(barIndex) * ratio, beat * 1.4, 0.994, seed + string + beatInBar),
        at + lag + string * 0.006,
        0.4,
      );
  });
}

function piano(): Float32Array {
  return everyBeat((track, at, beatInBar, barIndex) => {
    if (beatInBar % 2 === 1 || (barIndex >= 5 && barIndex < 7)) return;
    for (const ratio of [2, 2.5, 3])
      place(track, pluck(root(barIndex) * ratio, beat * 2.2, 0.998, 90 + beatInBar), at, 0.4);
  });
}

function synthPad(detuneHz: number): Float32Array {
  const track = emptyTrack();
  for (let barIndex = 4; barIndex < bars; barIndex++)
    place(track, pad(root(barIndex) * 2, bar + 0.2, detuneHz), barIndex * bar, 0.5);
  return track;
}

/** Phrases of the song: bar, note over the root, beats. */
const phrases = [
  [1, 2, 3],
  [2, 2.25, 2],
  [3, 3, 4],
  [5, 2.5, 3],
  [6, 2, 4],
  [8, 3, 3],
  [9, 2.5, 2],
  [10, 2.25, 4],
] as const;

function singer(ratio: number, seed: number, lag: number, level: number): Float32Array {
  const track = emptyTrack();
  for (const [barIndex, note, beats] of phrases)
    place(
      track,
      voice(root(barIndex) * note * ratio, beats * beat, 0.012, seed + barIndex),
      barIndex * bar + lag,
      level,
    );
  return track;
}

export type SampleFile = { name: string; bytes: Uint8Array<ArrayBuffer> };

/**
 * Makes the files one after the other, in the manner of a real export: names that mean little,
 * and the faults that cost a mix its first hours. `onFile` is told how many are done.
 */
export function makeSampleSession(onFile: (done: number, of: number) => void): SampleFile[] {
  const drums = { kick: mastered(kick(), 0.7), snare: mastered(snare(), 0.7) };
  const left = mastered(overhead(11, [drums.kick, drums.snare]), 0.5);
  const right = mastered(overhead(23, [drums.kick, drums.snare]), 0.5);
  const low = mastered(bass(), 0.6);
  const rhythm = [mastered(guitar(200, 0), 0.5), mastered(guitar(300, 0.008), 0.5)] as const;
  const keys = mastered(piano(), 0.45);
  const warm = [mastered(synthPad(0), 0.3), mastered(synthPad(0.7), 0.3)] as const;
  const lead = mastered(singer(1, 400, 0, 1), 0.6);
  const double = mastered(singer(1.004, 500, 0.021, 1), 0.45);
  const high = mastered(singer(1.5, 600, 0.013, 1), 0.4);

  // The rough mix is made before the faults are planted, as an artist bounces it.
  const mixOf = (side: 0 | 1): Float32Array => {
    const mix = emptyTrack();
    const parts = [
      drums.kick,
      drums.snare,
      side === 0 ? left : right,
      low,
      rhythm[side],
      keys,
      warm[side],
      lead,
      double,
      high,
    ];
    for (const part of parts) for (let i = 0; i < length; i++) mix[i]! += part[i]! * 0.32;
    return mix;
  };

  const files: [string, () => Float32Array[]][] = [
    ['Track 01 (3) KikIn.wav', () => [drums.kick]],
    // Driven into the converter.
    ['snr top.wav', () => [drums.snare.map((sample) => sample * 2.2)]],
    ['OH.L.wav', () => [left]],
    ['OH.R.wav', () => [right]],
    // Stopped early, while all the others go on.
    ['Bass DI_03.wav', () => [ringOut(low.slice(0, length - Math.round(1.5 * sampleRateHz)), 0.2)]],
    ['EGtr Rhy L.wav', () => [rhythm[0]]],
    ['EGtr Rhy R.wav', () => [rhythm[1]]],
    // One microphone, exported as stereo.
    ['Pno stereo.wav', () => [keys, keys]],
    ['Synth Pad warm.wav', () => [...warm]],
    // The chosen take begins in the middle of a word, cut without a fade.
    ['LV comp tuned.wav', () => [cutInto(lead)]],
    ['Lead Vox Dbl.wav', () => [double]],
    // Off centre, as a bad converter leaves it.
    ['BGV hi.wav', () => [high.map((sample) => sample + 0.02)]],
    // Exported with the track muted.
    ['tamb.wav', () => [emptyTrack()]],
    ['Salt on the Windows rough mix.wav', () => [mastered(mixOf(0), 0.8), mastered(mixOf(1), 0.8)]],
  ];
  return files.map(([name, make], index) => {
    const file = { name, bytes: writeWav(make()) };
    onFile(index + 1, files.length);
    return file;
  });
}

function cutInto(track: Float32Array): Float32Array {
  const from = Math.round((bar * 5 + beat * 0.9) * sampleRateHz);
  const to = Math.round(bar * 5 * sampleRateHz) - sampleRateHz / 100;
  return track.map((sample, i) => (i >= to && i < from ? 0 : sample));
}
