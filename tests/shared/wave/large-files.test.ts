import { open, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readWave } from '#shared/wave/read-wave.ts';
import { openNodeFile } from '../../../server/cli/node-files.ts';
import { bextChunk, sine, writeTestWave } from '../../support/audio-writer.ts';
import { countingSource, sparseSource } from '../../support/counting-source.ts';
import { run, withFolder } from '../../support/outside-programs.ts';

const gib = 1024 ** 3;
const wave = { sampleRateHz: 48000, encoding: 'pcm', bits: 24, channels: [sine(2, 24)] } as const;

/** The header of an RF64 file with `dataBytes` of audio, which are not there. */
function largeHeader(dataBytes: number, timeReference = 0n): Buffer {
  const bytes = writeTestWave({ ...wave, form: 'RF64', before: [bextChunk({ timeReference })] });
  const header = bytes.subarray(0, bytes.length - 6);
  header.writeBigUInt64LE(BigInt(dataBytes + header.length - 8), 20);
  header.writeBigUInt64LE(BigInt(dataBytes), 28);
  header.writeBigUInt64LE(BigInt(dataBytes / 3), 36);
  return header;
}

describe('files beyond 4 GiB', () => {
  it('twenty gigabytes are read in milliseconds, the chunks behind them too', async () => {
    await withFolder(async (folder) => {
      const path = join(folder, 'long take.wav');
      const dataBytes = 20 * gib - ((20 * gib) % 6);
      const header = largeHeader(dataBytes, 172_800_000n);
      const tail = Buffer.from('LIST\x04\0\0\0INFO', 'latin1');
      const file = await open(path, 'w');
      await file.write(header, 0, header.length, 0);
      await file.write(tail, 0, tail.length, header.length + dataBytes);
      await file.close();
      expect((await stat(path)).size).toBeGreaterThan(20e9);

      const source = await openNodeFile(path);
      const counted = countingSource(source);
      await readWave(counted, path);
      const started = performance.now();
      const reading = await readWave(counted, path);
      const took = performance.now() - started;
      await source.close();
      expect(reading).toMatchObject({
        kind: 'track',
        format: { container: 'rf64', frames: dataBytes / 3, timeReferenceFrames: 172_800_000 },
        layout: { dataBytes, promisedDataBytes: dataBytes },
      });
      expect(reading.kind === 'track' && reading.layout.chunks.at(-1)?.id).toBe('LIST');
      expect(counted.counts.largest).toBeLessThanOrEqual(65536);
      expect(counted.counts.bytes).toBeLessThan(100_000);
      expect(took).toBeLessThan(100);

      // ffprobe counts the same frames.
      const show = ['-v', 'error', '-of', 'csv=p=0', '-show_entries', 'stream=duration_ts'];
      expect(Number(await run('ffprobe', [...show, path]))).toBe(dataBytes / 3);
    });
  });

  it('a plain header whose 32 bits ran over is read to the end of the file', async () => {
    // 5 GiB of audio; the size field kept what is left beyond 4 GiB.
    const dataBytes = 5 * gib - ((5 * gib) % 6);
    const header = writeTestWave({ ...wave, lies: { dataBytes: dataBytes % 2 ** 32 } });
    const bytes = header.subarray(0, header.length - 6);
    const source = sparseSource(bytes.length + dataBytes, [{ offset: 0, bytes }]);
    expect(await readWave(source, 'long.wav')).toMatchObject({
      kind: 'track',
      format: { frames: dataBytes / 3 },
      layout: { promisedDataBytes: null },
    });
  });

  it('a streamed header promises nothing beyond 4 GiB either, with and without RF64', async () => {
    const dataBytes = 5 * gib - ((5 * gib) % 6);
    for (const form of ['RIFF', 'RF64'] as const) {
      const whole = writeTestWave({ ...wave, form, lies: { dataBytes: 0xffffffff } });
      const header = Buffer.from(whole.subarray(0, whole.length - 6));
      if (form === 'RF64') header.fill(0xff, 20, 44);
      const source = sparseSource(header.length + dataBytes, [{ offset: 0, bytes: header }]);
      expect(await readWave(source, 'long.wav')).toMatchObject({
        format: { frames: dataBytes / 3 },
        layout: { promisedDataBytes: null },
      });
    }
  });

  it('a file made of nothing but empty chunks is given up', async () => {
    const chunks = Buffer.from('JUNK\0\0\0\0'.repeat(200_000), 'latin1');
    const bytes = Buffer.concat([Buffer.from('RIFF\xff\xff\xff\0WAVE', 'latin1'), chunks]);
    const source = countingSource(sparseSource(bytes.length, [{ offset: 0, bytes }]));
    expect(await readWave(source, 'a.wav')).toMatchObject({ reason: 'no-format-chunk' });
    expect(source.counts.bytes).toBeLessThan(200_000);
  });
});
