import type { z } from 'zod';
import type { FindingCode } from '../finding.ts';
import { completeness } from './completeness.ts';
import type { FindingDefinition } from './definition.ts';
import { fileAndFormat } from './file-and-format.ts';
import { names } from './names.ts';
import { signal } from './signal.ts';
import { startAndLength } from './start-and-length.ts';

/** Every code with its arguments, default level, next step, rule and repairs. */
export const findingDefinitions = {
  ...fileAndFormat,
  ...startAndLength,
  ...signal,
  ...names,
  ...completeness,
} satisfies Record<FindingCode, FindingDefinition>;

/** The typed arguments of a code. */
export type ArgumentsOf<Code extends FindingCode> = z.infer<
  (typeof findingDefinitions)[Code]['arguments']
>;
