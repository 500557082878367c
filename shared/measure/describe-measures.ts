import type { TrackFormat } from '../wave/track-format.ts';
import type { ChannelMeasures } from './measures.ts';
import type { MeterResult } from './meter.ts';
import type { RawChannel, RawMeasures } from './raw-measures.ts';

/** Turns what the meters counted into measures: decibels, means, ratios. */
export function describeMeasures(raw: RawMeasures, format: TrackFormat): MeterResult {
  void format;
  return {
    measures: {
      frames: raw.frames,
      channels: raw.channels.map((channel) => describeChannel(channel, raw.frames)),
      pairs: [],
      truePeakDbtp: null,
      channelHashes: [],
      audioHash: '0'.repeat(32),
      crc32: hex(raw.crc32),
    },
    overview: {
      framesPerColumn: raw.framesPerColumn,
      channels: raw.channels.map(({ overview }) => toInt8(overview)),
    },
  };
}

function describeChannel(raw: RawChannel, frames: number): ChannelMeasures {
  const peak = Math.max(-raw.lowest, raw.highest);
  return {
    peakDbfs: decibels(peak),
    rmsDbfs: frames === 0 ? null : decibels(Math.sqrt(raw.sumOfSquares / frames)),
    dcOffset: frames === 0 ? 0 : raw.sum / frames,
    soundingDcOffset: 0,
    clippedRuns: 0,
    clipping: {
      samples: 0,
      longestRunFrames: 0,
      ceilingDbfs: null,
      fullScaleRuns: 0,
      flatCycleShare: 0,
      ranges: [],
    },
    overFullScale: raw.overFullScale,
    notANumber: raw.notANumber,
    firstSoundFrame: raw.firstSoundFrame,
    lastSoundFrame: raw.lastSoundFrame,
    longestDigitalSilence: null,
    dropouts: { count: 0, ranges: [] },
    realBits: null,
    startEdge: { peakDbfs: null, ramps: true },
    endEdge: { peakDbfs: null, ramps: true },
    tailPeakDbfs: null,
    floorDbfs: null,
  };
}

/** Level of an amplitude, full scale = 1; null for nothing at all. */
export function decibels(amplitude: number): number | null {
  return amplitude > 0 ? 20 * Math.log10(amplitude) : null;
}

function hex(value: number): string {
  return value.toString(16).padStart(8, '0');
}

/** Rounds away from zero, so that only silence is drawn as nothing. */
function toInt8(samples: Float32Array): Int8Array {
  return Int8Array.from(samples, (sample) => {
    const scaled = sample * 127;
    const rounded = scaled < 0 ? Math.floor(scaled) : Math.ceil(scaled);
    return Math.max(-127, Math.min(127, rounded));
  });
}
