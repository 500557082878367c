import { describe, expect, it } from 'vitest';
import { bytesSource, type ByteSource } from '#shared/bytes/byte-source.ts';
import { AppError } from '#shared/errors.ts';
import { createMeters } from '#shared/measure/create-meters.ts';
import { measuresSchema } from '#shared/measure/measures.ts';
import { measureTrack } from '#shared/measure/measure-track.ts';
import { overviewColumns } from '#shared/measure/overview.ts';
import { writeTestWave } from '../../support/audio-writer.ts';
import { countingSource } from '../../support/counting-source.ts';
import { floatMono, newMeters, noise, pcm, sampled } from '../../support/measuring.ts';
import { readTrack } from '../../support/reading.ts';

const random = noise(2);
const file = writeTestWave(pcm(24, [sampled(900_000, () => 0.3 * random())]));

async function measure(source: ByteSource, reading = readTrack(file)) {
  return measureTrack(source, await reading, await newMeters());
}

describe('measuring a track', { timeout: 30_000 }, () => {
  it('reads the file once and one byte of it again', async () => {
    const source = countingSource(bytesSource(file));
    const { measures } = await measure(source);
    expect(measures).toMatchObject({ fileBytes: file.length, changedWhileRead: false });
    expect(source.counts.bytes).toBeLessThanOrEqual(file.length + 2);
    expect(source.counts.largest).toBeLessThanOrEqual(1 << 20);
    expect(() => measuresSchema.parse(measures)).not.toThrow();
  });

  it('notices a file that ends too early, grows or cannot be read again', async () => {
    const source = bytesSource(file);
    const short: ByteSource = {
      ...source,
      stream: () => bytesSource(file.subarray(0, file.length - 50_000)).stream(0),
    };
    const longer: ByteSource = { ...source, size: file.length - 50_000 };
    const broken: ByteSource = {
      ...source,
      read: () => Promise.reject(new AppError('no-access', { path: 'x' })),
    };
    for (const changed of [short, longer, broken]) {
      expect((await measure(changed)).measures.changedWhileRead).toBe(true);
    }
  });

  it('says how far it is, and stops when told to', async () => {
    const reading = await readTrack(file);
    const engine = await newMeters();
    let bytes = 0;
    await measureTrack(bytesSource(file), reading, engine, { onBytes: (more) => (bytes += more) });
    expect(bytes).toBe(file.length);

    const abort = new AbortController();
    const stopped = measureTrack(bytesSource(file), reading, engine, {
      signal: abort.signal,
      onBytes: () => abort.abort(new AppError('cancelled')),
    });
    await expect(stopped).rejects.toThrow(new AppError('cancelled'));
    // The engine is ready for the next file.
    const { measures } = await measureTrack(bytesSource(file), reading, engine);
    expect(measures.changedWhileRead).toBe(false);
  });

  it("keeps a picture of at most 2,048 columns, whose extremes are the file's", async () => {
    const shapes = [1, 2047, 2048, 2049, 5000, 131_072, 131_073, 900_000];
    for (const frames of shapes) {
      const samples = sampled(frames, (frame) => (frame === frames - 1 ? -0.99 : 0.25));
      const bytes = writeTestWave(pcm(16, [samples]));
      const { overview } = await measureTrack(
        bytesSource(bytes),
        await readTrack(bytes),
        await newMeters(),
      );
      const columns = Math.ceil(frames / overview.framesPerColumn);
      expect(columns).toBeLessThanOrEqual(overviewColumns);
      expect(overview.channels[0]).toHaveLength(2 * columns);
      // 0.25 * 127 and 0.99 * 127, rounded away from zero.
      expect(overview.channels[0]!.at(-2)).toBe(-126);
      if (frames > 1) expect(overview.channels[0]![1]).toBe(32);
    }
  });

  it('measures the first 64 of more channels', async () => {
    const channels = Array.from({ length: 70 }, (_, c) => sampled(100, () => (c + 1) / 100));
    const bytes = writeTestWave({ ...floatMono([]), channels });
    const { measures } = await measure(bytesSource(bytes), readTrack(bytes));
    expect(measures.channels).toHaveLength(64);
    expect(measures.channels[63]!.peakDbfs).toBeCloseTo(20 * Math.log10(0.64), 6);
    expect(() => measuresSchema.parse(measures)).not.toThrow();
  });
});

describe('the engine', () => {
  it('is an error where the module is not ours, never something else that steps in', () => {
    // The smallest module there is: magic number and version.
    const empty = new WebAssembly.Module(new Uint8Array([0, 0x61, 0x73, 0x6d, 1, 0, 0, 0]));
    expect(() => createMeters(empty)).toThrow(expect.objectContaining({ code: 'engine-failed' }));
  });

  it('measures one file at a time', async () => {
    const engine = await newMeters();
    const { format, layout } = await readTrack(file);
    const first = engine.open(format, layout);
    const second = engine.open(format, layout);
    expect(() => first.write(file)).toThrow(/another file/);
    second.write(file);
    expect(second.finish().measures.frames).toBe(900_000);
    expect(() => second.finish()).toThrow();
  });
});
