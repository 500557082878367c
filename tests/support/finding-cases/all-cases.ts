import type { FindingCode } from '#shared/findings/finding.ts';
import { completenessCases } from './completeness.ts';
import { fileAndFormatCases } from './file-and-format.ts';
import type { FindingCase } from './finding-case.ts';
import { identityCases } from './identity.ts';
import { nameCases } from './names.ts';
import { signalCases } from './signal.ts';
import { startAndLengthCases } from './start-and-length.ts';

/** A defect and its clean twin for every code. */
export const findingCases: Record<FindingCode, FindingCase> = {
  ...fileAndFormatCases,
  ...startAndLengthCases,
  ...signalCases,
  ...identityCases,
  ...nameCases,
  ...completenessCases,
};
