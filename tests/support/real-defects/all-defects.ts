import type { FindingCode } from '#shared/findings/finding.ts';
import { realFileAndFormat } from './file-and-format.ts';
import { realCompleteness, realNames } from './names-and-completeness.ts';
import type { RealDefect } from './real-defect.ts';
import { realSignal } from './signal.ts';
import { realStartAndLength } from './start-and-length.ts';

/** Every code on real sound; a file that changes while it is read needs a test of its own. */
export const realDefects: Record<Exclude<FindingCode, 'changed-while-read'>, RealDefect> = {
  ...realFileAndFormat,
  ...realStartAndLength,
  ...realSignal,
  ...realNames,
  ...realCompleteness,
};
