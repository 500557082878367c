import { z } from 'zod';
import { nameFailureReasons } from '../../naming/explain-name.ts';
import { nameTokens } from '../../rules/naming-rules.ts';
import { define } from './definition.ts';

/** Findings about how files are called. Names are given without folder and extension. */
export const names = {
  'name-breaks-rule': define({
    arguments: z.strictObject({
      name: z.string(),
      /** Which parts of the convention fail, and how. */
      faults: z
        .array(
          z.strictObject({
            token: z.enum([...nameTokens, 'name']),
            reason: z.enum(nameFailureReasons),
            /** As it stands in the name, and as it should; empty where there is nothing to say. */
            found: z.string(),
            expected: z.string(),
          }),
        )
        .min(1),
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
    // Only a person can say what it is.
    repairs: [],
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
    repairs: [],
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
      /** The characters that may not be there; what cannot be seen as `U+0007`. */
      characters: z.array(z.string()),
      /** What may not stand at an end of the name. */
      ends: z.array(
        z.enum(['dot-at-end', 'space-at-end', 'space-at-start', 'hyphen-at-start', 'dot-at-start']),
      ),
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
