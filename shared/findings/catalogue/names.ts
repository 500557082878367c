import { z } from 'zod';
import { define } from './definition.ts';

/** Findings about how files are called. Names are given without folder and extension. */
export const names = {
  'name-breaks-rule': define({
    arguments: z.strictObject({
      name: z.string(),
      /** Which parts of the convention fail, as the naming explains them; at least one. */
      faults: z.array(z.string()).min(1),
      /** null where no proper name can be worked out. */
      proposedName: z.string().nullable(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'names.tokens',
    repairs: ['rename'],
  }),
  'name-unclear': define({
    arguments: z.strictObject({ name: z.string() }),
    level: 'look',
    nextStep: 'decide',
    rule: 'names.groups',
    repairs: ['rename'],
  }),
  'number-repeated': define({
    arguments: z.strictObject({ number: z.number().int().nonnegative() }),
    level: 'look',
    nextStep: 'we-can-fix',
    rule: 'names.tokens',
    repairs: ['rename'],
  }),
  'number-missing': define({
    arguments: z.strictObject({ numbers: z.array(z.number().int().nonnegative()).min(1) }),
    level: 'off',
    nextStep: 'decide',
    rule: 'names.tokens',
    repairs: ['rename'],
  }),
  'name-too-long': define({
    arguments: z.strictObject({
      name: z.string(),
      characters: z.number().int().positive(),
      maximumCharacters: z.number().int().positive(),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'names.maximumLength',
    repairs: ['rename'],
  }),
  'name-characters': define({
    arguments: z.strictObject({
      name: z.string(),
      /** The characters that may not be there; control characters as `U+0007`. */
      characters: z.array(z.string()).min(1),
    }),
    level: 'look',
    nextStep: 'decide',
    rule: 'names.characters',
    repairs: ['rename'],
  }),
  'name-reserved': define({
    arguments: z.strictObject({ name: z.string() }),
    level: 'look',
    nextStep: 'decide',
    rule: 'levels.name-reserved',
    repairs: ['rename'],
  }),
  'name-clash': define({
    arguments: z.strictObject({ name: z.string() }),
    level: 'must-fix',
    nextStep: 'decide',
    rule: 'levels.name-clash',
    repairs: ['rename'],
  }),
  'export-leftover': define({
    arguments: z.strictObject({
      name: z.string(),
      /** As written in the name. */
      leftovers: z.array(z.string()).min(1),
    }),
    level: 'note',
    nextStep: 'know',
    rule: 'levels.export-leftover',
    repairs: ['rename'],
  }),
  'looks-like-takes': define({
    arguments: z.strictObject({ part: z.string(), takes: z.number().int().min(2) }),
    level: 'look',
    nextStep: 'decide',
    rule: 'levels.looks-like-takes',
    repairs: ['leave-out'],
  }),
};
