import { z } from 'zod';
import { define } from './definition.ts';

/** Findings about what should have come along. */
export const completeness = {
  'rough-mix-missing': define({
    arguments: z.strictObject({
      /** The order of importance would do instead. */
      orderWouldDo: z.boolean(),
    }),
    level: 'must-fix',
    nextStep: 'decide',
    rule: 'bring.roughMix',
    repairs: [],
  }),
  'reference-missing': define({
    arguments: z.strictObject({
      wanted: z.number().int().positive(),
      given: z.number().int().nonnegative(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.references',
    repairs: [],
  }),
  'order-missing': define({
    arguments: z.strictObject({}),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.orderOfImportance',
    repairs: [],
  }),
  'notes-missing': define({
    arguments: z.strictObject({}),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.notes',
    repairs: [],
  }),
  'di-missing': define({
    arguments: z.strictObject({ part: z.string() }),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.diFor',
    repairs: [],
  }),
  'dry-missing': define({
    arguments: z.strictObject({ part: z.string() }),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.dryFor',
    repairs: [],
  }),
  'untuned-missing': define({
    arguments: z.strictObject({ part: z.string() }),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.untunedFor',
    repairs: [],
  }),
  'tempo-missing': define({
    arguments: z.strictObject({}),
    level: 'look',
    nextStep: 'decide',
    rule: 'bring.tempo',
    repairs: [],
  }),
};
