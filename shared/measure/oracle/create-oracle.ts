import { createXXHash128 } from 'hash-wasm';
import type { TrackFormat, WaveLayout } from '../../wave/track-format.ts';
import { decodeChannel } from '../decode-channel.ts';
import { describeMeasures } from '../describe-measures.ts';
import { maxMeasuredChannels } from '../measures.ts';
import type { MeterEngine } from '../meter.ts';
import { chooseFramesPerColumn } from '../overview.ts';
import type { RawChannel, RawMeasures } from '../raw-measures.ts';
import { crc32 } from './crc32.ts';
import { canonicalBytes } from './canonical-bytes.ts';
import { drawOverview } from './draw-overview.ts';
import { findGrid } from './find-grid.ts';
import { findOutliers } from './find-outliers.ts';
import { findSilence } from './find-silence.ts';
import { findSound } from './find-sound.ts';
import { measureClipping } from './measure-clipping.ts';
import { measureEdges } from './measure-edges.ts';
import { measureLevels } from './measure-levels.ts';
import { measureTruePeak } from './measure-true-peak.ts';

/**
 * The same measures in plain TypeScript, each a function over all samples of a channel: to be
 * read, and to hold the WebAssembly against. It keeps the whole file in memory and takes its
 * time; nothing but tests and the benchmark runs it.
 */
export async function createOracle(): Promise<MeterEngine> {
  const hasher = await createXXHash128();
  const hash = (bytes: Uint8Array) => hasher.init().update(bytes).digest('hex');
  return {
    name: 'oracle',
    open(format, layout) {
      const blocks: Uint8Array[] = [];
      return {
        write(bytes) {
          blocks.push(bytes.slice());
        },
        finish() {
          return describeMeasures(measureFile(join(blocks), format, layout, hash));
        },
      };
    },
  };
}

function join(blocks: Uint8Array[]): Uint8Array {
  const joined = new Uint8Array(blocks.reduce((length, block) => length + block.length, 0));
  let at = 0;
  for (const block of blocks) {
    joined.set(block, at);
    at += block.length;
  }
  return joined;
}

function measureFile(
  file: Uint8Array,
  format: TrackFormat,
  layout: WaveLayout,
  hash: (bytes: Uint8Array) => string,
): RawMeasures {
  const data = file.subarray(layout.dataOffset, layout.dataOffset + layout.dataBytes);
  const measured = Math.min(format.channels, maxMeasuredChannels);
  const decoded = Array.from({ length: measured }, (_, channel) =>
    decodeChannel(data, channel, format, layout),
  );
  const samples = decoded.map((channel) => channel.map((x) => (Number.isFinite(x) ? x : 0)));
  const frames = samples[0]?.length ?? 0;
  const channels = samples.map((channel, index): RawChannel => ({
    ...measureLevels(channel, format),
    ...findSound(channel),
    ...findSilence(channel, format),
    ...measureEdges(channel, format),
    truePeak: measureTruePeak(channel),
    gridBits: findGrid(channel, format),
    clipping: measureClipping(channel, format),
    overFullScale: findOutliers(channel, (sample) => Math.abs(sample) > 1),
    notANumber: findOutliers(decoded[index]!, (sample) => !Number.isFinite(sample)),
    hash: hash(canonicalBytes(data, index, format, layout)),
    overview: drawOverview(channel),
  }));
  return {
    frames,
    crc32: crc32(file),
    framesPerColumn: chooseFramesPerColumn(frames),
    channels,
    pairProducts: Array.from({ length: Math.floor(samples.length / 2) }, (_, pair) =>
      sumOfProducts(samples[2 * pair]!, samples[2 * pair + 1]!),
    ),
    audioHash: joinedHash(
      channels.map((channel) => channel.hash),
      hash,
    ),
  };
}

function sumOfProducts(first: Float64Array, second: Float64Array): number {
  return first.reduce((sum, sample, frame) => sum + sample * second[frame]!, 0);
}

/** The identity of all channels: of one its own hash, of several the hash of their hashes. */
function joinedHash(hashes: string[], hash: (bytes: Uint8Array) => string): string {
  if (hashes.length === 1) return hashes[0]!;
  const pairsOfDigits = hashes.join('').match(/../g) ?? [];
  return hash(Uint8Array.from(pairsOfDigits, (digits) => parseInt(digits, 16)));
}
