import type { FindingCode } from '#shared/findings/finding.ts';
import type { ChannelMeasures } from '#shared/measure/measures.ts';
import { defaultThresholds } from '#shared/rules/thresholds.ts';
import { channelMeasures, measuredFile } from '../measure-builders.ts';
import { quietRules, type FindingCase } from './finding-case.ts';

const path = 'Organ.wav';
const float = { encoding: 'float', bits: 32, containerBits: 32 } as const;
const range = (startFrame: number, endFrame: number) => ({ startFrame, endFrame });
const sure = (startFrame: number, endFrame: number) => ({
  startFrame,
  endFrame,
  confidence: 'sure' as const,
});

/** A channel with clipped runs of 4 frames each, a second apart. */
export function clippedChannel(
  runs: number,
  clipping: Partial<ChannelMeasures['clipping']> = {},
): Partial<ChannelMeasures> {
  return {
    peakDbfs: -3,
    clippedRuns: runs,
    clipping: {
      samples: runs * 4,
      longestRunFrames: 4,
      ceilingDbfs: -3,
      fullScaleRuns: 0,
      flatCycleShare: 0.01,
      ranges: Array.from({ length: runs }, (_, index) =>
        range(index * 48_000 + 100, index * 48_000 + 104),
      ),
      ...clipping,
    },
  };
}

const gap = (...starts: number[]): Partial<ChannelMeasures> => ({
  dropouts: { count: starts.length, ranges: starts.map((start) => range(start, start + 480)) },
});

export const signalCases = {
  clipped: {
    defect: {
      add: [
        measuredFile({ path, channel: clippedChannel(3) }),
        measuredFile({
          path: 'Snare.wav',
          format: { channels: 2 },
          channels: [clippedChannel(3), {}],
        }),
      ],
    },
    found: [
      {
        code: 'clipped',
        level: 'must-fix',
        files: [path],
        args: {
          runs: 3,
          longestRunFrames: 4,
          longestRunMs: 4 / 48,
          ceilingDbfs: -3,
          atFullScale: false,
        },
        places: 3,
        ranges: [sure(100, 104), sure(48_100, 48_104), sure(96_100, 96_104)],
        channel: null,
      },
      {
        code: 'clipped',
        level: 'look',
        files: ['Snare.wav'],
        args: {
          runs: 3,
          longestRunFrames: 4,
          longestRunMs: 4 / 48,
          ceilingDbfs: -3,
          atFullScale: false,
        },
        places: 3,
        channel: 0,
      },
    ],
    clean: { add: [measuredFile({ path, channel: clippedChannel(2, { samples: 7 }) })] },
  },
  'flat-tops': {
    defect: {
      add: [
        measuredFile({
          path: 'Synth Lead.wav',
          channel: clippedChannel(900, { flatCycleShare: 0.8, ranges: [] }),
        }),
      ],
    },
    found: [
      {
        code: 'flat-tops',
        level: 'note',
        files: ['Synth Lead.wav'],
        args: { flatCyclePercent: 80, ceilingDbfs: -3 },
      },
    ],
    clean: {
      add: [
        measuredFile({
          path: 'Synth Lead.wav',
          channel: { clipping: { ...channelMeasures().clipping, flatCycleShare: 0.9 } },
        }),
      ],
    },
  },
  'over-full-scale': {
    defect: {
      add: [
        measuredFile({
          path,
          format: float,
          channel: { peakDbfs: 2.3, overFullScale: { count: 120, ranges: [range(5, 9)] } },
        }),
      ],
    },
    found: [
      {
        code: 'bit-depth-differs',
        level: 'note',
        files: [path],
        args: { bits: 32, encoding: 'float', sessionBits: 24, sessionEncoding: 'pcm' },
      },
      {
        code: 'over-full-scale',
        level: 'note',
        files: [path],
        args: { samples: 120, peakDbfs: 2.3 },
        places: 120,
        ranges: [sure(5, 9)],
        repairs: ['gain'],
      },
    ],
    clean: { add: [measuredFile({ path, channel: { peakDbfs: -1 } })] },
  },
  'between-sample-over': {
    defect: {
      add: [measuredFile({ path, channel: { peakDbfs: -1 }, measures: { truePeakDbtp: 0.1 } })],
      rules: { ...quietRules, levels: { 'between-sample-over': { level: 'look' } } },
    },
    found: [
      { code: 'between-sample-over', level: 'look', files: [path], args: { truePeakDbtp: 0.1 } },
    ],
    // Off unless the rules ask for it.
    clean: {
      add: [measuredFile({ path, channel: { peakDbfs: -1 }, measures: { truePeakDbtp: 0.1 } })],
    },
  },
  'above-ceiling': {
    defect: { add: [measuredFile({ path, channel: { peakDbfs: -0.9 } })] },
    found: [
      {
        code: 'above-ceiling',
        level: 'note',
        files: [path],
        args: { peakDbfs: -0.9, ceilingDbfs: -1 },
        repairs: ['gain'],
      },
    ],
    clean: { add: [measuredFile({ path, channel: { peakDbfs: -1 } })] },
  },
  'starts-on-sound': {
    defect: {
      add: [
        measuredFile({
          path,
          channel: { firstSoundFrame: 0, startEdge: { peakDbfs: -49.9, ramps: false } },
        }),
      ],
    },
    found: [
      {
        code: 'starts-on-sound',
        level: 'look',
        files: [path],
        args: { peakDbfs: -49.9 },
        places: 1,
        ranges: [sure(0, 48)],
        repairs: ['fade'],
      },
    ],
    clean: {
      add: [
        measuredFile({
          path,
          channel: { firstSoundFrame: 0, startEdge: { peakDbfs: -50, ramps: false } },
        }),
        measuredFile({
          path: 'Violin.wav',
          channel: { firstSoundFrame: 0, startEdge: { peakDbfs: -6, ramps: true } },
        }),
        // A drum that begins at zero with the very first sample.
        measuredFile({
          path: 'Snare.wav',
          channel: { firstSoundFrame: 1, startEdge: { peakDbfs: -6, ramps: false } },
        }),
      ],
    },
  },
  'ends-on-sound': {
    defect: {
      add: [
        measuredFile({
          path,
          channel: { lastSoundFrame: 8_639_999, endEdge: { peakDbfs: -49.9, ramps: false } },
        }),
      ],
    },
    found: [
      {
        code: 'ends-on-sound',
        level: 'look',
        files: [path],
        args: { peakDbfs: -49.9 },
        places: 1,
        ranges: [sure(8_639_952, 8_640_000)],
        repairs: ['fade'],
      },
    ],
    clean: {
      add: [
        measuredFile({
          path,
          channel: { lastSoundFrame: 8_639_999, endEdge: { peakDbfs: -50, ramps: false } },
        }),
        measuredFile({
          path: 'Violin.wav',
          channel: { lastSoundFrame: 8_639_999, endEdge: { peakDbfs: -6, ramps: true } },
        }),
      ],
    },
  },
  dropout: {
    defect: {
      add: [
        measuredFile({ path, channel: gap(480_000) }),
        // 240 frames later are 5 ms.
        measuredFile({ path: 'Violin.wav', channel: gap(2_400_240) }),
        measuredFile({ path: 'Trumpet.wav', channel: gap(2_400_000) }),
      ],
    },
    found: [
      {
        code: 'dropout',
        level: 'look',
        files: [path],
        args: { longestMs: 10, firstSeconds: 10, sharedPlaces: 0, sharedWith: [] },
        places: 1,
        ranges: [sure(480_000, 480_480)],
      },
      {
        code: 'dropout',
        level: 'must-fix',
        files: ['Violin.wav'],
        args: { longestMs: 10, firstSeconds: 50.005, sharedPlaces: 1, sharedWith: ['Trumpet.wav'] },
      },
      {
        code: 'dropout',
        level: 'must-fix',
        files: ['Trumpet.wav'],
        args: { longestMs: 10, firstSeconds: 50, sharedPlaces: 1, sharedWith: ['Violin.wav'] },
      },
    ],
    // Six of them are a style, and nothing another file's gap could agree with.
    clean: {
      add: [
        measuredFile({ path, channel: gap(100_000, 200_000, 300_000, 400_000, 500_000, 600_000) }),
      ],
    },
  },
  silent: {
    defect: {
      add: [
        measuredFile({ path, channel: { peakDbfs: null, rmsDbfs: null } }),
        measuredFile({ path: 'Violin.wav', channel: { peakDbfs: -90.3 } }),
      ],
    },
    found: [
      { code: 'silent', level: 'look', files: [path], args: {}, repairs: ['leave-out'] },
      { code: 'silent', level: 'look', files: ['Violin.wav'], args: {} },
    ],
    clean: { add: [measuredFile({ path: 'Reverb.wav', channel: { peakDbfs: -90.2 } })] },
  },
  'nearly-silent': {
    defect: { add: [measuredFile({ path, channel: { peakDbfs: -60.1 } })] },
    found: [
      {
        code: 'nearly-silent',
        level: 'look',
        files: [path],
        args: { peakDbfs: -60.1, floorDbfs: -60 },
        repairs: ['leave-out'],
      },
    ],
    clean: {
      add: [
        measuredFile({ path, channel: { peakDbfs: -60 } }),
        measuredFile({ path: 'Vocal Reverb Return.wav', channel: { peakDbfs: -70 } }),
      ],
    },
  },
  'dc-offset': {
    defect: {
      add: [
        measuredFile({
          path,
          format: { channels: 2 },
          channels: [
            { soundingDcOffset: 0.002, dcOffset: 0.001 },
            { soundingDcOffset: -0.0101, dcOffset: -0.005 },
          ],
        }),
      ],
    },
    found: [
      {
        code: 'dc-offset',
        level: 'look',
        files: [path],
        channel: 1,
        args: { offsetPercent: -1.01 },
        repairs: ['high-pass'],
      },
    ],
    clean: {
      add: [measuredFile({ path, channel: { soundingDcOffset: defaultThresholds.dcOffset } })],
    },
  },
  'not-a-number': {
    defect: {
      add: [
        measuredFile({
          path,
          format: float,
          channel: { notANumber: { count: 12, ranges: [range(2_016_000, 2_016_012)] } },
        }),
      ],
    },
    found: [
      {
        code: 'bit-depth-differs',
        level: 'note',
        files: [path],
        args: { bits: 32, encoding: 'float', sessionBits: 24, sessionEncoding: 'pcm' },
      },
      {
        code: 'not-a-number',
        level: 'must-fix',
        files: [path],
        args: { samples: 12, firstSeconds: 42 },
        ranges: [sure(2_016_000, 2_016_012)],
      },
    ],
    clean: { add: [measuredFile({ path })] },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
