import { z } from 'zod';
import { define } from './definition.ts';

const count = z.number().int().positive();
const dbfs = z.number();

/** Findings about the sound itself. */
export const signal = {
  clipped: define({
    arguments: z.strictObject({
      runs: count,
      longestRunFrames: z.number().int().nonnegative(),
      longestRunMs: z.number().nonnegative(),
      ceilingDbfs: dbfs,
      /** The ceiling is full scale itself; else it was clipped first and turned down afterwards. */
      atFullScale: z.boolean(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.clippedRuns',
    repairs: [],
  }),
  'flat-tops': define({
    arguments: z.strictObject({
      flatCyclePercent: z.number().min(0).max(100),
      ceilingDbfs: dbfs,
    }),
    level: 'note',
    nextStep: 'know',
    rule: 'signal.flatTopsShare',
    repairs: [],
  }),
  'over-full-scale': define({
    arguments: z.strictObject({ samples: count, peakDbfs: dbfs }),
    level: 'note',
    nextStep: 'know',
    rule: 'levels.over-full-scale',
    repairs: ['gain'],
  }),
  'between-sample-over': define({
    arguments: z.strictObject({ truePeakDbtp: z.number() }),
    level: 'off',
    nextStep: 'know',
    rule: 'levels.between-sample-over',
    repairs: [],
  }),
  'above-ceiling': define({
    arguments: z.strictObject({ peakDbfs: dbfs, ceilingDbfs: dbfs }),
    level: 'note',
    nextStep: 'know',
    rule: 'signal.ceilingDbfs',
    repairs: ['gain'],
  }),
  'starts-on-sound': define({
    arguments: z.strictObject({ peakDbfs: dbfs }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.edgeDbfs',
    repairs: ['fade'],
  }),
  'ends-on-sound': define({
    arguments: z.strictObject({ peakDbfs: dbfs }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.edgeDbfs',
    repairs: ['fade'],
  }),
  dropout: define({
    arguments: z.strictObject({
      longestMs: z.number().positive(),
      firstSeconds: z.number().nonnegative(),
      /** How many of the places are at the same time in another file, and in which files. */
      sharedPlaces: z.number().int().nonnegative(),
      sharedWith: z.array(z.string()),
    }),
    level: 'look',
    nextStep: 'export-again',
    rule: 'signal.dropoutMostPlaces',
    repairs: [],
  }),
  silent: define({
    arguments: z.strictObject({}),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.silentDbfs',
    repairs: ['leave-out'],
  }),
  'nearly-silent': define({
    arguments: z.strictObject({ peakDbfs: dbfs, floorDbfs: dbfs }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.nearlySilentDbfs',
    repairs: ['leave-out'],
  }),
  'dc-offset': define({
    arguments: z.strictObject({
      /** Signed: above or below the middle line, percent of full scale. */
      offsetPercent: z.number(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.dcOffset',
    repairs: ['high-pass'],
  }),
  'same-audio': define({
    arguments: z.strictObject({
      kind: z.enum(['exact', 'after-gain-or-shift']),
      /** Second file over the first. */
      gainDb: z.number(),
      shiftFrames: z.number().int(),
      shiftMs: z.number(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'signal.sameAudioDb',
    repairs: ['leave-out'],
  }),
  'polarity-twin': define({
    arguments: z.strictObject({ gainDb: z.number(), shiftFrames: z.number().int() }),
    level: 'note',
    nextStep: 'know',
    rule: 'signal.polarityTwinDb',
    repairs: [],
  }),
  'not-a-number': define({
    arguments: z.strictObject({ samples: count, firstSeconds: z.number().nonnegative() }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.not-a-number',
    repairs: [],
  }),
};
