import type { FindingCode } from '#shared/findings/finding.ts';
import { measuredFile, unmeasuredFile } from '../measure-builders.ts';
import { goodTracks, quietRules, type FindingCase } from './finding-case.ts';

const path = 'Organ.wav';
const stereo = { channels: 2 };
const rules = (format: Partial<typeof quietRules.format>) => ({
  ...quietRules,
  format: { ...quietRules.format, ...format },
});

export const fileAndFormatCases = {
  unreadable: {
    defect: {
      add: [unmeasuredFile(path, { kind: 'unreadable', reason: 'no-data-chunk', byteOffset: 36 })],
    },
    found: [
      {
        code: 'unreadable',
        level: 'must-fix',
        files: [path],
        args: { reason: 'no-data-chunk', byteOffset: 36 },
      },
    ],
    clean: { add: [unmeasuredFile('Lyrics.txt', { kind: 'not-audio' })] },
  },
  'cut-short': {
    // 480,000 frames at 48 kHz are 10 s.
    defect: {
      add: [
        measuredFile({ path, reading: { kind: 'track', promisedFrames: 8_640_000 + 480_000 } }),
      ],
    },
    found: [
      {
        code: 'cut-short',
        level: 'must-fix',
        files: [path],
        args: { promisedSeconds: 190, missingSeconds: 10, missingFrames: 480_000 },
      },
    ],
    clean: { add: [measuredFile({ path, reading: { kind: 'track', promisedFrames: null } })] },
  },
  'changed-while-read': {
    defect: { add: [measuredFile({ path, measures: { changedWhileRead: true } })] },
    found: [{ code: 'changed-while-read', level: 'must-fix', files: [path], args: {} }],
    clean: { add: [measuredFile({ path })] },
  },
  'not-wav': {
    defect: {
      add: [
        measuredFile({ path: 'Organ.aif', format: { container: 'aiff' } }),
        unmeasuredFile('Horns.flac', { kind: 'other-audio', formatName: 'FLAC', lossy: false }),
      ],
    },
    found: [
      {
        code: 'not-wav',
        level: 'note',
        files: ['Organ.aif'],
        args: { formatName: 'AIFF', readable: true },
        repairs: ['rewrite-container'],
      },
      {
        code: 'not-wav',
        level: 'must-fix',
        files: ['Horns.flac'],
        args: { formatName: 'FLAC', readable: false },
        repairs: [],
      },
    ],
    clean: { add: [measuredFile({ path, format: { container: 'rf64' } })] },
  },
  lossy: {
    defect: {
      add: [
        unmeasuredFile('Organ.mp3', { kind: 'other-audio', formatName: 'MP3', lossy: true }),
        unmeasuredFile('Rough Mix.mp3', { kind: 'other-audio', formatName: 'MP3', lossy: true }),
      ],
    },
    found: [
      {
        code: 'lossy',
        level: 'must-fix',
        files: ['Organ.mp3'],
        args: { formatName: 'MP3', onlyForListening: false },
      },
      {
        code: 'lossy',
        level: 'note',
        files: ['Rough Mix.mp3'],
        args: { formatName: 'MP3', onlyForListening: true },
      },
    ],
    clean: { add: [measuredFile({ path })] },
  },
  'sample-rate-differs': {
    // The same three minutes: 7,938,000 frames at 44.1 kHz.
    defect: {
      add: [measuredFile({ path, format: { sampleRateHz: 44_100, frames: 7_938_000 } })],
    },
    found: [
      {
        code: 'sample-rate-differs',
        level: 'must-fix',
        files: [path],
        args: { sampleRateHz: 44_100, sessionSampleRateHz: 48_000, evenlySplit: false },
      },
    ],
    clean: { instead: goodTracks({ format: { sampleRateHz: 44_100 } }) },
  },
  'wrong-speed': {
    // 44.1 / 48 = 0.91875 of three minutes is 165.375 s.
    defect: { add: [measuredFile({ path, format: { frames: 7_938_000 } })] },
    found: [
      {
        code: 'wrong-speed',
        level: 'must-fix',
        files: [path],
        args: {
          lengthRatio: 0.91875,
          labelledHz: 48_000,
          likelyHz: 44_100,
          lengthSeconds: 165.375,
          sessionLengthSeconds: 180,
        },
      },
    ],
    // 0.06 % off that ratio: shorter by chance.
    clean: { add: [measuredFile({ path, format: { frames: 7_938_000 - 4_770 } })] },
    foundInClean: [
      {
        code: 'length-differs',
        level: 'note',
        files: [path],
        args: {
          lengthSeconds: (7_938_000 - 4_770) / 48_000,
          sessionLengthSeconds: 180,
          differenceFrames: -706_770,
          differenceSeconds: -706_770 / 48_000,
          startProven: true,
          shiftSeconds: null,
          soundsAtOnce: false,
          fitsAtEnd: false,
        },
      },
    ],
  },
  'sample-rate-not-allowed': {
    defect: { rules: rules({ sampleRatesHz: [44_100, 88_200] }) },
    found: [
      {
        code: 'sample-rate-not-allowed',
        level: 'look',
        files: goodTracks().map((file) => file.path),
        args: { sampleRateHz: 48_000, allowedHz: [44_100, 88_200] },
      },
    ],
    clean: { rules: rules({ sampleRatesHz: [44_100, 48_000] }) },
  },
  'bit-depth-low': {
    defect: {
      add: [measuredFile({ path, format: { bits: 16 } })],
      rules: { ...rules({ minimumBits: 24 }), levels: {} },
    },
    found: [
      {
        code: 'bit-depth-low',
        level: 'must-fix',
        files: [path],
        args: { bits: 16, minimumBits: 24 },
      },
      {
        code: 'bit-depth-differs',
        level: 'note',
        files: [path],
        args: { bits: 16, encoding: 'pcm', sessionBits: 24, sessionEncoding: 'pcm' },
      },
    ],
    clean: {
      instead: goodTracks({ format: { bits: 16 } }),
      rules: rules({ minimumBits: 16 }),
    },
  },
  'bit-depth-differs': {
    defect: { add: [measuredFile({ path, format: { bits: 32, encoding: 'float' } })] },
    found: [
      {
        code: 'bit-depth-differs',
        level: 'note',
        files: [path],
        args: { bits: 32, encoding: 'float', sessionBits: 24, sessionEncoding: 'pcm' },
      },
    ],
    clean: { instead: goodTracks({ format: { bits: 32, encoding: 'float' } }) },
  },
  'empty-bits': {
    defect: { add: [measuredFile({ path, channel: { realBits: 16 } })] },
    found: [
      {
        code: 'empty-bits',
        level: 'note',
        files: [path],
        args: { bits: 24, realBits: 16, encoding: 'pcm' },
      },
    ],
    clean: { add: [measuredFile({ path, format: stereo, channels: [{ realBits: 16 }] })] },
  },
  'too-many-channels': {
    defect: { add: [measuredFile({ path, format: { channels: 6 } })] },
    found: [
      {
        code: 'too-many-channels',
        level: 'note',
        files: [path],
        args: { channels: 6 },
        repairs: ['split'],
      },
    ],
    clean: { add: [measuredFile({ path, format: stereo })] },
  },
  'dual-mono': {
    defect: {
      add: [
        measuredFile({ path, format: stereo, pair: { sideUnderMidDb: 70, gainDb: -3 } }),
        measuredFile({ path: 'Violin.wav', format: stereo, pair: { sideUnderMidDb: 69.9 } }),
        measuredFile({
          path: 'Cello.wav',
          format: stereo,
          pair: { identical: true, sideUnderMidDb: 140, gainDb: 0 },
        }),
      ],
    },
    found: [
      {
        code: 'dual-mono',
        level: 'look',
        files: [path],
        args: { identical: false, sideUnderMidDb: 70, gainDb: -3, nearly: false },
        repairs: ['keep-one-side'],
      },
      {
        code: 'dual-mono',
        level: 'note',
        files: ['Violin.wav'],
        args: { identical: false, sideUnderMidDb: 69.9, gainDb: 0.2, nearly: true },
        repairs: [],
      },
      {
        code: 'dual-mono',
        level: 'look',
        files: ['Cello.wav'],
        args: { identical: true, sideUnderMidDb: null, gainDb: 0, nearly: false },
      },
    ],
    clean: { add: [measuredFile({ path, format: stereo, pair: { sideUnderMidDb: 49.9 } })] },
  },
  'sides-cancel': {
    defect: {
      add: [
        measuredFile({
          path,
          format: stereo,
          pair: { midUnderSideDb: 50, sideUnderMidDb: -50, correlation: -0.99999 },
        }),
      ],
    },
    found: [
      { code: 'sides-cancel', level: 'must-fix', files: [path], args: { midUnderSideDb: 50 } },
    ],
    clean: {
      add: [
        measuredFile({
          path,
          format: stereo,
          pair: { midUnderSideDb: 49.9, sideUnderMidDb: -49.9, correlation: -0.9999 },
        }),
      ],
    },
  },
  'one-side-silent': {
    defect: {
      add: [
        measuredFile({
          path,
          format: stereo,
          channels: [{ peakDbfs: -80.1 }, { peakDbfs: -49.9 }],
        }),
      ],
    },
    found: [
      {
        code: 'one-side-silent',
        level: 'look',
        files: [path],
        channel: 0,
        args: { silentSide: 'left', peakDbfs: -49.9 },
        repairs: ['keep-one-side'],
      },
    ],
    clean: {
      add: [
        measuredFile({
          path,
          format: stereo,
          channels: [{ peakDbfs: -79.9 }, { peakDbfs: -20 }],
        }),
        measuredFile({
          path: 'Violin.wav',
          format: stereo,
          channels: [{ peakDbfs: -50.1 }, { peakDbfs: null }],
        }),
      ],
    },
  },
  'split-stereo': {
    defect: {
      add: [measuredFile({ path: 'Organ L.wav' }), measuredFile({ path: 'Organ R.wav' })],
      comparison: {
        sides: [
          { left: 'Organ L.wav', right: 'Organ R.wav', correlation: 0.6, loudnessCorrelation: 0.5 },
        ],
      },
    },
    found: [
      {
        code: 'split-stereo',
        level: 'note',
        files: ['Organ L.wav', 'Organ R.wav'],
        args: { left: 'Organ L.wav', right: 'Organ R.wav' },
        repairs: ['join'],
      },
    ],
    clean: {
      add: [measuredFile({ path: 'Organ L.wav' }), measuredFile({ path: 'Organ R.wav' })],
      comparison: {
        sides: [
          {
            left: 'Organ L.wav',
            right: 'Organ R.wav',
            correlation: 0.59,
            loudnessCorrelation: 0.84,
          },
        ],
      },
    },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
