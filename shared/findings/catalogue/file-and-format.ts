import { z } from 'zod';
import { unreadableReasons } from '../../wave/track-format.ts';
import { define } from './definition.ts';

const rateHz = z.number().int().positive();
const bits = z.number().int().min(1).max(64);

/** Findings about the file as such and its format. */
export const fileAndFormat = {
  unreadable: define({
    arguments: z.strictObject({
      reason: z.enum(unreadableReasons),
      byteOffset: z.number().int().nonnegative(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.unreadable',
    repairs: [],
  }),
  'cut-short': define({
    arguments: z.strictObject({
      promisedSeconds: z.number().nonnegative(),
      missingSeconds: z.number().nonnegative(),
      missingFrames: z.number().int().positive(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.cut-short',
    repairs: [],
  }),
  'changed-while-read': define({
    arguments: z.strictObject({}),
    level: 'must-fix',
    nextStep: 'decide',
    rule: 'levels.changed-while-read',
    repairs: [],
  }),
  'not-wav': define({
    arguments: z.strictObject({
      formatName: z.string(),
      /** The samples could be read, so the file can be rewritten as WAV. */
      readable: z.boolean(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.not-wav',
    repairs: [],
  }),
  lossy: define({
    arguments: z.strictObject({
      formatName: z.string(),
      /** A rough mix or a reference: it is only listened to. */
      onlyForListening: z.boolean(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.lossy',
    repairs: [],
  }),
  'sample-rate-differs': define({
    arguments: z.strictObject({
      sampleRateHz: rateHz,
      sessionSampleRateHz: rateHz,
      /** No rate has a majority; the session's rate is then only a guess. */
      evenlySplit: z.boolean(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.sample-rate-differs',
    repairs: [],
  }),
  'wrong-speed': define({
    arguments: z.strictObject({
      /** Length of this file over the session's length. */
      lengthRatio: z.number().positive(),
      labelledHz: rateHz,
      /** The rate at which its length would be the session's. */
      likelyHz: rateHz,
      lengthSeconds: z.number().nonnegative(),
      sessionLengthSeconds: z.number().nonnegative(),
    }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'levels.wrong-speed',
    repairs: [],
  }),
  'sample-rate-not-allowed': define({
    arguments: z.strictObject({ sampleRateHz: rateHz, allowedHz: z.array(rateHz) }),
    level: 'look',
    nextStep: 'decide',
    rule: 'format.sampleRatesHz',
    repairs: [],
  }),
  'bit-depth-low': define({
    arguments: z.strictObject({ bits, minimumBits: bits }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'format.minimumBits',
    repairs: [],
  }),
  'bit-depth-differs': define({
    arguments: z.strictObject({
      bits,
      encoding: z.enum(['pcm', 'float']),
      sessionBits: bits,
      sessionEncoding: z.enum(['pcm', 'float']),
    }),
    level: 'note',
    nextStep: 'know',
    rule: 'levels.bit-depth-differs',
    repairs: [],
  }),
  'empty-bits': define({
    arguments: z.strictObject({ bits, realBits: bits, encoding: z.enum(['pcm', 'float']) }),
    level: 'note',
    nextStep: 'know',
    rule: 'levels.empty-bits',
    repairs: [],
  }),
  'too-many-channels': define({
    arguments: z.strictObject({ channels: z.number().int().min(3) }),
    level: 'note',
    nextStep: 'we-can-fix',
    rule: 'levels.too-many-channels',
    repairs: ['split'],
  }),
  'dual-mono': define({
    arguments: z.strictObject({
      /** Bit for bit the same; else the same but for gain, or nearly. */
      identical: z.boolean(),
      /** How far the difference lies under the sound, dB; null where nothing is left of it. */
      sideUnderMidDb: z.number().nullable(),
      /** Right over left, dB. */
      gainDb: z.number(),
      nearly: z.boolean(),
    }),
    level: 'look',
    nextStep: 'we-can-fix',
    rule: 'signal.dualMonoDb',
    repairs: ['keep-one-side'],
  }),
  'sides-cancel': define({
    arguments: z.strictObject({ midUnderSideDb: z.number().nullable() }),
    level: 'must-fix',
    nextStep: 'export-again',
    rule: 'signal.sidesCancelDb',
    repairs: [],
  }),
  'one-side-silent': define({
    arguments: z.strictObject({
      silentSide: z.enum(['left', 'right']),
      /** Peak of the side that sounds. */
      peakDbfs: z.number(),
    }),
    level: 'look',
    nextStep: 'we-can-fix',
    rule: 'signal.oneSideSilentDbfs',
    repairs: ['keep-one-side'],
  }),
  'split-stereo': define({
    arguments: z.strictObject({ left: z.string(), right: z.string() }),
    level: 'note',
    nextStep: 'we-can-fix',
    rule: 'levels.split-stereo',
    repairs: ['join'],
  }),
};
