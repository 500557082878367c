import type { FindingCode } from '#shared/findings/finding.ts';
import { measuredFile } from '../measure-builders.ts';
import { goodTracks, type FindingCase } from './finding-case.ts';

const path = 'Organ.wav';
/** 20 s shorter than three minutes. */
const shorter = 7_680_000;

const shorterBy20 = {
  lengthSeconds: 160,
  sessionLengthSeconds: 180,
  differenceFrames: -960_000,
  differenceSeconds: -20,
  startProven: false,
  shiftSeconds: null,
  soundsAtOnce: false,
  fitsAtEnd: false,
};

/** Clips that sound at once, of lengths that spread. */
const looseClips = (soundingAtOnce: number) =>
  [60, 90, 100, 180].map((seconds, index) =>
    measuredFile({
      path: ['Kick In.wav', 'Bass DI.wav', 'Piano.wav', 'Lead Vocal.wav'][index] ?? '',
      format: { frames: seconds * 48_000 },
      // 479 frames at 48 kHz are less than 10 ms, 480 are not.
      channel: { firstSoundFrame: index < soundingAtOnce ? 479 : 480 },
    }),
  );

export const startAndLengthCases = {
  'length-differs': {
    defect: {
      add: [
        // Ringing at its end, so a silent end proves nothing.
        measuredFile({
          path,
          format: { frames: shorter },
          channel: { tailPeakDbfs: -59.9, floorDbfs: -60, endEdge: { peakDbfs: -60, ramps: true } },
        }),
        // A time stamp that puts it 20 s into the session: its start was cut.
        measuredFile({
          path: 'Violin.wav',
          format: { frames: shorter, timeReferenceFrames: 960_000 },
          channel: { tailPeakDbfs: -59.9, floorDbfs: -60, endEdge: { peakDbfs: -60, ramps: true } },
        }),
        // 48 frames are the millisecond that ends may be rounded by.
        measuredFile({ path: 'Cello.wav', format: { frames: 8_640_049 } }),
      ],
      instead: goodTracks({ format: { timeReferenceFrames: 0 } }),
    },
    found: [
      { code: 'length-differs', level: 'look', files: [path], args: shorterBy20, repairs: [] },
      {
        code: 'length-differs',
        level: 'must-fix',
        files: ['Violin.wav'],
        args: { ...shorterBy20, shiftSeconds: 20 },
        repairs: [],
      },
      {
        code: 'start-differs',
        level: 'look',
        files: ['Violin.wav'],
        args: {
          differenceSeconds: 20,
          differenceFrames: 960_000,
          timeReferenceFrames: 960_000,
          sessionTimeReferenceFrames: 0,
          likelyStale: false,
        },
      },
      {
        code: 'length-differs',
        level: 'look',
        files: ['Cello.wav'],
        args: {
          ...shorterBy20,
          lengthSeconds: 8_640_049 / 48_000,
          differenceFrames: 49,
          differenceSeconds: 49 / 48_000,
        },
        repairs: [],
      },
    ],
    // As good tracks: shorter at a silent end is a note of the same code, see below.
    clean: { add: [measuredFile({ path })] },
  },
  'start-differs': {
    defect: {
      instead: goodTracks({ format: { timeReferenceFrames: 172_800_000 } }),
      add: [
        // Ten seconds earlier, and longer by that: it cannot have been cut at its start.
        measuredFile({
          path,
          format: { timeReferenceFrames: 172_320_000, frames: 9_120_000 },
        }),
        measuredFile({ path: 'Violin.wav', format: { timeReferenceFrames: 172_800_480 } }),
      ],
    },
    found: [
      {
        code: 'length-differs',
        level: 'look',
        files: [path],
        args: {
          lengthSeconds: 190,
          sessionLengthSeconds: 180,
          differenceFrames: 480_000,
          differenceSeconds: 10,
          startProven: false,
          shiftSeconds: null,
          soundsAtOnce: false,
          fitsAtEnd: false,
        },
      },
      {
        code: 'start-differs',
        level: 'look',
        files: [path],
        args: {
          differenceSeconds: -10,
          differenceFrames: -480_000,
          timeReferenceFrames: 172_320_000,
          sessionTimeReferenceFrames: 172_800_000,
          likelyStale: false,
        },
        repairs: ['move'],
      },
      {
        code: 'start-differs',
        level: 'note',
        files: ['Violin.wav'],
        args: {
          differenceSeconds: 0.01,
          differenceFrames: 480,
          timeReferenceFrames: 172_800_480,
          sessionTimeReferenceFrames: 172_800_000,
          likelyStale: true,
        },
        repairs: [],
      },
    ],
    // Stamped one by one as they were recorded: nobody agrees, so nothing differs.
    clean: {
      instead: goodTracks().map((file, index) => ({
        ...file,
        format: file.format && { ...file.format, timeReferenceFrames: 1_000_000 * index },
      })),
    },
  },
  'not-consolidated': {
    defect: { instead: looseClips(2) },
    found: [
      {
        code: 'not-consolidated',
        level: 'must-fix',
        files: ['Kick In.wav', 'Bass DI.wav', 'Piano.wav', 'Lead Vocal.wav'],
        args: { tracks: 4, soundingAtOnce: 2, shortestSeconds: 60, longestSeconds: 180 },
      },
    ],
    clean: { instead: looseClips(1) },
    foundInClean: [
      {
        code: 'length-differs',
        level: 'look',
        files: ['Kick In.wav', 'Bass DI.wav', 'Piano.wav'],
        args: {
          lengthSeconds: 60,
          sessionLengthSeconds: 180,
          differenceFrames: -5_760_000,
          differenceSeconds: -120,
          startProven: false,
          shiftSeconds: null,
          soundsAtOnce: true,
          fitsAtEnd: false,
        },
      },
    ],
  },
  'tail-cut': {
    defect: {
      add: [
        measuredFile({
          path,
          channel: {
            tailPeakDbfs: -59.9,
            floorDbfs: -72,
            endEdge: { peakDbfs: -74.9, ramps: true },
          },
        }),
      ],
    },
    found: [
      {
        code: 'tail-cut',
        level: 'look',
        files: [path],
        args: { tailPeakDbfs: -59.9, floorDbfs: -72 },
        places: 1,
        ranges: [{ startFrame: 8_639_999, endFrame: 8_640_000, confidence: 'sure' }],
      },
    ],
    clean: {
      add: [
        measuredFile({
          path,
          channel: { tailPeakDbfs: -60, floorDbfs: -90, endEdge: { peakDbfs: -60, ramps: true } },
        }),
        measuredFile({
          path: 'Violin.wav',
          channel: { tailPeakDbfs: -40, floorDbfs: -52, endEdge: { peakDbfs: -60, ramps: true } },
        }),
        // A drum that has died away by its last millisecond.
        measuredFile({
          path: 'Snare.wav',
          channel: { tailPeakDbfs: -40, floorDbfs: -90, endEdge: { peakDbfs: -75, ramps: true } },
        }),
      ],
    },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
