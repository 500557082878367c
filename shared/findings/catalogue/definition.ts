import type { z } from 'zod';
import type { Level, RepairKind } from '../finding.ts';

/**
 * What the person does next about a finding. Counts on screen speak in these: "2 to export again,
 * 3 we can fix, 2 to decide".
 */
export const nextSteps = ['export-again', 'we-can-fix', 'decide', 'know'] as const;
export type NextStep = (typeof nextSteps)[number];

/** What is fixed about a code, whatever the language: all but its words. */
export type FindingDefinition<Arguments extends z.ZodObject = z.ZodObject> = {
  /** The numbers and words its sentences need, with units in their names. */
  arguments: Arguments;
  /** Where the check itself does not say more; `off`: only where house rules ask for it. */
  level: Level | 'off';
  /** What to do about it where no safe repair is on offer. */
  nextStep: NextStep;
  /** The place in the house rules that decides about it, dotted. */
  rule: string;
  /** Repairs usually on offer; a check can offer others. */
  repairs: readonly RepairKind[];
};

export function define<Arguments extends z.ZodObject>(
  definition: FindingDefinition<Arguments>,
): FindingDefinition<Arguments> {
  return definition;
}
