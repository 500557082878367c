import type { ChannelMeasures, PairMeasures } from './measures.ts';
import type { MeterResult } from './meter.ts';
import type { RawChannel, RawClipping, RawEdge, RawMeasures } from './raw-measures.ts';

/** Turns what the meters counted into measures: decibels, means, ratios. */
export function describeMeasures(raw: RawMeasures): MeterResult {
  const truePeak = Math.max(0, ...raw.channels.map((channel) => channel.truePeak));
  return {
    measures: {
      frames: raw.frames,
      channels: raw.channels.map((channel) => describeChannel(channel, raw.frames)),
      pairs: raw.pairProducts.map((sumOfProducts, pair) =>
        describePair(raw.channels, 2 * pair, sumOfProducts),
      ),
      truePeakDbtp: decibels(truePeak),
      channelHashes: raw.channels.map(({ hash }) => hash),
      audioHash: raw.audioHash,
      crc32: raw.crc32.toString(16).padStart(8, '0'),
    },
    overview: {
      framesPerColumn: raw.framesPerColumn,
      channels: raw.channels.map(({ overview }) => toInt8(overview)),
    },
  };
}

function describeChannel(raw: RawChannel, frames: number): ChannelMeasures {
  const mean = (sum: number, count: number) => (count === 0 ? 0 : sum / count);
  return {
    peakDbfs: decibels(Math.max(-raw.lowest, raw.highest)),
    rmsDbfs: decibels(Math.sqrt(mean(raw.sumOfSquares, frames))),
    dcOffset: mean(raw.sum, frames),
    soundingDcOffset: mean(raw.soundingSum, raw.soundingFrames),
    clippedRuns: raw.clipping.runs,
    clipping: describeClipping(raw.clipping),
    overFullScale: raw.overFullScale,
    notANumber: raw.notANumber,
    firstSoundFrame: raw.firstSoundFrame,
    lastSoundFrame: raw.lastSoundFrame,
    longestDigitalSilence: raw.longestDigitalSilence,
    dropouts: raw.dropouts,
    realBits: raw.gridBits || null,
    startEdge: describeEdge(raw.startEdge),
    endEdge: describeEdge(raw.endEdge),
    tailPeakDbfs: decibels(raw.tailPeak),
    floorDbfs: decibels(raw.floor),
  };
}

function describeClipping(raw: RawClipping): ChannelMeasures['clipping'] {
  return {
    samples: raw.samples,
    longestRunFrames: raw.longestRunFrames,
    ceilingDbfs: decibels(raw.ceiling),
    fullScaleRuns: raw.fullScaleRuns,
    flatCycleShare: raw.cycles === 0 ? 0 : raw.flatCycles / raw.cycles,
    ranges: raw.ranges,
  };
}

function describeEdge({ peak, ramps }: RawEdge) {
  return { peakDbfs: decibels(peak), ramps };
}

/** What lies further apart is beyond the accuracy of the sums. */
const mostDb = 140;

/**
 * Two channels brought to one level have a mid of 2(1 + r) and a side of 2(1 - r) times their
 * energy, r being their correlation: so no third pass over the samples is needed.
 */
function describePair(channels: RawChannel[], first: number, sumOfProducts: number): PairMeasures {
  const [one, other] = [channels[first]!, channels[first + 1]!];
  const pair = {
    channels: [first, first + 1] as [number, number],
    identical: one.hash === other.hash,
  };
  if (one.sumOfSquares === 0 || other.sumOfSquares === 0) {
    return { ...pair, sideUnderMidDb: null, midUnderSideDb: null, gainDb: null, correlation: null };
  }
  const energy = Math.sqrt(one.sumOfSquares) * Math.sqrt(other.sumOfSquares);
  const correlation = limit(sumOfProducts / energy, 1);
  const sideUnderMidDb = limit(10 * Math.log10((1 + correlation) / (1 - correlation)), mostDb);
  return {
    ...pair,
    sideUnderMidDb,
    midUnderSideDb: 0 - sideUnderMidDb,
    gainDb: 10 * Math.log10(other.sumOfSquares / one.sumOfSquares),
    correlation,
  };
}

function limit(value: number, most: number): number {
  return Math.max(-most, Math.min(most, value));
}

/** Level of an amplitude, full scale = 1; null for nothing at all. */
export function decibels(amplitude: number): number | null {
  return amplitude > 0 ? 20 * Math.log10(amplitude) : null;
}

/** Rounds away from zero, so that only silence is drawn as nothing. */
function toInt8(samples: Float32Array): Int8Array {
  return Int8Array.from(samples, (sample) => {
    const scaled = sample * 127;
    return limit(scaled < 0 ? Math.floor(scaled) : Math.ceil(scaled), 127);
  });
}
