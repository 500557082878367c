import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createOracle } from '#shared/measure/oracle/create-oracle.ts';
import { loadMeters } from '../../../server/cli/load-meters.ts';
import { writeTestAiff, writeTestWave, type TestSamples } from '../../support/audio-writer.ts';
import { measureInPieces } from '../../support/measuring.ts';
import { readTrack } from '../../support/reading.ts';

/**
 * The WebAssembly meters against the plain ones, on sound made to meet every meter's corners:
 * everything that is counted, placed or hashed must be equal, sums within their rounding. And
 * the WebAssembly against itself: how the bytes are cut must not change a bit.
 */

type Stretch = { kind: string; frames: number; level: number; period: number };

const stretch: fc.Arbitrary<Stretch> = fc.record({
  kind: fc.constantFrom(
    'zeros',
    'constant',
    'sine',
    'clipped',
    'square',
    'noise',
    'steps',
    'fade',
    'spike',
    'impossible',
    'over',
  ),
  frames: fc.oneof(fc.integer({ min: 1, max: 80 }), fc.integer({ min: 1, max: 1500 })),
  level: fc.constantFrom(1, 0.9999, 0.5, 0.3, 0.02, 0.001, 0.0009, 0.00003),
  period: fc.constantFrom(2, 3.7, 8, 24, 100.3, 480, 4000),
});

const format = fc.record({
  encoding: fc.constantFrom(
    'pcm8',
    'pcm16',
    'pcm20',
    'pcm24',
    'pcm32',
    'float32',
    'float64',
    'aiff8',
    'aiff16',
    'aiff24',
    'aiff32',
  ),
  sampleRateHz: fc.constantFrom(8000, 22_050, 44_100, 48_000, 96_000, 192_000, 384_000),
});

type Recipe = { stretches: Stretch[][]; encoding: string; sampleRateHz: number; lead: number };

const recipe: fc.Arbitrary<Recipe> = fc
  .tuple(
    format,
    fc.array(fc.array(stretch, { maxLength: 7 }), { minLength: 1, maxLength: 5 }),
    fc.integer({ min: 0, max: 300 }),
  )
  .map(([chosen, stretches, lead]) => ({ ...chosen, stretches, lead }));

function render(stretches: Stretch[], isFloat: boolean): number[] {
  const samples: number[] = [];
  for (const { kind, frames, level, period } of stretches) {
    for (let i = 0; i < frames; i++) {
      const sine = Math.sin((2 * Math.PI * i) / period);
      const grain = Math.sin(i * 12.9898 + frames) * 43758.5453;
      const random = 2 * (grain - Math.floor(grain)) - 1;
      const shapes: Record<string, number> = {
        zeros: 0,
        constant: level,
        sine: level * sine,
        clipped: Math.max(-level, Math.min(level, 1.4 * level * sine)),
        square: sine >= 0 ? level : -level,
        noise: level * random,
        steps: Math.round(random) * 2 ** -15,
        fade: (level * sine * i) / frames,
        spike: i === 0 ? level : 0,
        impossible: i % 3 === 0 ? Infinity * (random < 0 ? -1 : 1) : i % 3 === 1 ? NaN : sine,
        over: 1.5 * level * sine,
      };
      const sample = shapes[kind]!;
      samples.push(isFloat ? sample : Number.isFinite(sample) ? sample : 0);
    }
  }
  return samples;
}

function write({ stretches, encoding, sampleRateHz, lead }: Recipe): Buffer {
  const isFloat = encoding.startsWith('float');
  const bits = Number(/\d+/.exec(encoding)![0]);
  const rendered = stretches.map((channel) => render(channel, isFloat));
  const frames = Math.max(...rendered.map((channel) => channel.length));
  const most = 2 ** (bits - 1);
  const channels = rendered.map((channel) =>
    Array.from({ length: frames }, (_, frame) => {
      const sample = channel[frame] ?? 0;
      if (isFloat) return bits === 32 ? Math.fround(sample) : sample;
      return Math.max(-most, Math.min(most - 1, Math.round(sample * most)));
    }),
  );
  const samples: TestSamples = {
    sampleRateHz,
    encoding: isFloat ? 'float' : 'pcm',
    bits,
    channels,
  };
  const before = [{ id: 'JUNK', bytes: new Uint8Array(lead).fill(7) }];
  const after = [{ id: 'junk', bytes: new Uint8Array(77).fill(9) }];
  return encoding.startsWith('aiff')
    ? writeTestAiff({ ...samples, before, after })
    : writeTestWave({ ...samples, before, after });
}

const summed = ['rmsDbfs', 'dcOffset', 'soundingDcOffset', 'gainDb', 'correlation'];
const apart = ['sideUnderMidDb', 'midUnderSideDb'];

/**
 * What differs. Sums may by their order, levels of a difference by the share of that in what is
 * left; nothing else may.
 */
function differences(a: unknown, b: unknown, path: string, name = ''): string[] {
  if (typeof a === 'number' && typeof b === 'number') {
    const energy = (db: number) => 10 ** (-Math.abs(db) / 10);
    const same = summed.includes(name)
      ? Math.abs(a - b) < 1e-9
      : apart.includes(name)
        ? Math.abs(energy(a) - energy(b)) < 1e-12
        : a === b;
    return same ? [] : [`${path}: ${a} instead of ${b}`];
  }
  if (a instanceof Int8Array && b instanceof Int8Array) {
    return a.join() === b.join() ? [] : [`${path}: another picture`];
  }
  if (typeof a === 'object' && typeof b === 'object' && a && b) {
    const other = b as Record<string, unknown>;
    const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
    return [...keys].flatMap((key) =>
      differences((a as Record<string, unknown>)[key], other[key], `${path}.${key}`, key),
    );
  }
  return a === b ? [] : [`${path}: ${String(a)} instead of ${String(b)}`];
}

describe('the meters in WebAssembly', { timeout: 120_000 }, () => {
  it('say what the plain ones say, whatever the file and however it is cut', async () => {
    const [meters, oracle] = [await loadMeters(), await createOracle()];
    await fc.assert(
      fc.asyncProperty(
        recipe,
        fc.array(fc.integer({ min: 0, max: 5000 }), { maxLength: 12 }),
        async (made, pieces) => {
          const bytes = write(made);
          const reading = await readTrack(bytes).catch(() => null);
          // A file without a single frame is no track.
          fc.pre(reading !== null);
          if (!reading) return;
          const whole = measureInPieces(meters, bytes, reading, []);
          const cut = measureInPieces(meters, bytes, reading, pieces);
          expect(JSON.stringify(cut)).toBe(JSON.stringify(whole));
          const plain = measureInPieces(oracle, bytes, reading, []);
          expect(differences(whole, plain, 'result')).toEqual([]);
        },
      ),
      { numRuns: 300 },
    );
  });

  it.each([
    ['one byte', () => 1],
    ['one frame', (frameBytes: number) => frameBytes],
    ['an odd number of bytes', () => 1021],
    ['more than fits at once', () => 3_000_000],
  ])('take %s at a time', async (_, pieceOf) => {
    const meters = await loadMeters();
    for (const encoding of ['pcm16', 'pcm24', 'float32', 'aiff24', 'pcm32']) {
      const stretches = [
        { kind: 'zeros', frames: 700, level: 0, period: 1 },
        { kind: 'clipped', frames: 3000, level: 0.9, period: 100.3 },
        { kind: 'zeros', frames: 100, level: 0, period: 1 },
        { kind: 'noise', frames: 1234, level: 0.3, period: 1 },
      ];
      const other = [{ kind: 'sine', frames: 5000, level: 0.5, period: 24 }];
      const bytes = write({
        stretches: [stretches, other],
        encoding,
        sampleRateHz: 48_000,
        lead: 5,
      });
      const reading = await readTrack(bytes);
      const piece = pieceOf(reading.layout.bytesPerFrame);
      const pieces = Array.from({ length: Math.ceil(bytes.length / piece) }, () => piece);
      expect(measureInPieces(meters, bytes, reading, pieces)).toEqual(
        measureInPieces(meters, bytes, reading, []),
      );
    }
  });
});
