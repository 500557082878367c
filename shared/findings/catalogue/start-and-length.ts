import { z } from 'zod';
import { define } from './definition.ts';

const seconds = z.number().nonnegative();

/** Findings about where files begin and how long they are. */
export const startAndLength = {
  'length-differs': define({
    arguments: z.strictObject({
      lengthSeconds: seconds,
      sessionLengthSeconds: seconds,
      /** This file minus the session, in frames at the session's rate. */
      differenceFrames: z.number().int(),
      differenceSeconds: z.number(),
      /** It is proven that this file begins with the others, so only its end differs. */
      startProven: z.boolean(),
      /** How far its beginning is off, where there is evidence for that; null without. */
      shiftSeconds: z.number().nullable(),
      /** It sounds from its first moment, the others do not: perhaps its start was cut off. */
      soundsAtOnce: z.boolean(),
      /** It fits the others better when all end together: perhaps its start was cut off. */
      fitsAtEnd: z.boolean(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'startAndLength.lengthToleranceFrames',
    repairs: [],
  }),
  'start-differs': define({
    arguments: z.strictObject({
      /** This file's time stamp minus the session's. */
      differenceSeconds: z.number(),
      differenceFrames: z.number().int(),
      timeReferenceFrames: z.number().int().nonnegative(),
      sessionTimeReferenceFrames: z.number().int().nonnegative(),
      /** The file is as long as the session: the stamp is most likely a leftover. */
      likelyStale: z.boolean(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'levels.start-differs',
    repairs: ['move'],
  }),
  'not-consolidated': define({
    arguments: z.strictObject({
      tracks: z.number().int().positive(),
      soundingAtOnce: z.number().int().positive(),
      shortestSeconds: seconds,
      longestSeconds: seconds,
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.not-consolidated',
    repairs: [],
  }),
  'tail-cut': define({
    arguments: z.strictObject({ tailPeakDbfs: z.number(), floorDbfs: z.number().nullable() }),
    level: 'look',
    nextStep: 'export-again',
    rule: 'signal.tailDbfs',
    repairs: [],
  }),
};
