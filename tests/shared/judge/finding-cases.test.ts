import { describe, expect, it } from 'vitest';
import { findingCodes } from '#shared/findings/finding.ts';
import { findingCases } from '../../support/finding-cases/all-cases.ts';
import { findingsOf } from '../../support/finding-cases/finding-case.ts';

/*
 * Every code by its defect, with the exact arguments and everything else that is found, and by a
 * clean twin that lies just on the other side of the threshold. The thresholds are trade judgement
 * unless shared/rules/thresholds.ts names a source.
 */
describe.each(findingCodes)('%s', (code) => {
  const { defect, found, clean, foundInClean = [] } = findingCases[code] ?? {};

  it('is found, with its arguments, and nothing else is', () => {
    if (!defect || !found) throw new Error(`no defect case for ${code}`);
    const findings = findingsOf(defect);
    expect(findings.map((finding) => [finding.code, finding.level, finding.files])).toEqual(
      found.map((finding) => [finding.code, finding.level, finding.files]),
    );
    findings.forEach((finding, index) => {
      const { args, ...expected } = found[index]!;
      expect(finding).toMatchObject(expected);
      expect(Object.keys(finding.args).sort()).toEqual(Object.keys(args).sort());
      for (const [name, value] of Object.entries(args)) {
        if (typeof value === 'number') expect(finding.args[name], name).toBeCloseTo(value, 9);
        else expect(finding.args[name], name).toEqual(value);
      }
    });
  });

  it('is not found in the clean twin', () => {
    if (!clean) throw new Error(`no clean case for ${code}`);
    expect(
      findingsOf(clean).map(({ code, level, files, args }) => ({ code, level, files, args })),
    ).toEqual(foundInClean);
  });
});
