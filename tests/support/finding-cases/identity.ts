import type { FindingCode } from '#shared/findings/finding.ts';
import { measuredFile } from '../measure-builders.ts';
import type { FindingCase } from './finding-case.ts';

const path = 'Organ.wav';

export const identityCases = {
  'same-audio': {
    defect: {
      add: [
        measuredFile({ path, measures: { channelHashes: ['a'.repeat(32)] } }),
        // The same on both sides of a stereo file.
        measuredFile({
          path: 'Organ 2.wav',
          format: { channels: 2 },
          measures: { channelHashes: ['a'.repeat(32), 'a'.repeat(32)] },
        }),
        measuredFile({ path: 'Violin.wav' }),
        measuredFile({ path: 'Viola.wav' }),
      ],
      comparison: {
        matches: [
          {
            first: 'Violin.wav',
            second: 'Viola.wav',
            gainDb: -3,
            shiftFrames: 4_800,
            inverted: false,
            differenceUnderDb: 60,
          },
        ],
      },
    },
    found: [
      {
        code: 'same-audio',
        level: 'look',
        files: [path, 'Organ 2.wav'],
        args: { kind: 'exact', gainDb: 0, shiftFrames: 0, shiftMs: 0 },
        repairs: ['leave-out'],
      },
      {
        code: 'same-audio',
        level: 'note',
        files: ['Violin.wav', 'Viola.wav'],
        args: { kind: 'after-gain-or-shift', gainDb: -3, shiftFrames: 4_800, shiftMs: 100 },
      },
    ],
    clean: {
      add: [
        // Two silent files are the same, but that is not what is wrong with them.
        measuredFile({ path: 'Violin.wav' }),
        measuredFile({ path: 'Viola.wav' }),
      ],
      comparison: {
        matches: [
          {
            first: 'Violin.wav',
            second: 'Viola.wav',
            gainDb: -3,
            shiftFrames: 4_800,
            inverted: false,
            differenceUnderDb: 59.9,
          },
        ],
      },
    },
  },
  'polarity-twin': {
    defect: {
      add: [measuredFile({ path: 'Violin.wav' }), measuredFile({ path: 'Viola.wav' })],
      comparison: {
        matches: [
          {
            first: 'Violin.wav',
            second: 'Viola.wav',
            gainDb: 1,
            shiftFrames: 0,
            inverted: true,
            differenceUnderDb: 40,
          },
        ],
      },
    },
    found: [
      {
        code: 'polarity-twin',
        level: 'note',
        files: ['Violin.wav', 'Viola.wav'],
        args: { gainDb: 1, shiftFrames: 0 },
      },
    ],
    clean: {
      add: [measuredFile({ path: 'Violin.wav' }), measuredFile({ path: 'Viola.wav' })],
      comparison: {
        matches: [
          {
            first: 'Violin.wav',
            second: 'Viola.wav',
            gainDb: 1,
            shiftFrames: 0,
            inverted: true,
            differenceUnderDb: 39.9,
          },
        ],
      },
    },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
