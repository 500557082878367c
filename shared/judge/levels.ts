import { findingDefinitions } from '../findings/catalogue/definitions.ts';
import type { FindingCode, Level } from '../findings/finding.ts';
import type { HouseRules } from '../rules/house-rules.ts';

/**
 * How pressing a finding is: what the house rules say for the file's group, else what they say in
 * general, else what the check worked out, else the catalogue's default. null: not reported.
 */
export function levelUnderRules(
  code: FindingCode,
  workedOut: Level | undefined,
  group: string | null,
  rules: HouseRules,
): Level | null {
  const rule = rules.levels[code];
  const ruled = (group === null ? undefined : rule?.byGroup?.[group]) ?? rule?.level;
  const level = ruled ?? workedOut ?? findingDefinitions[code].level;
  return level === 'off' ? null : level;
}
