import { isDeepStrictEqual } from 'node:util';
import type { Difference } from '#shared/api/reports.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';

/**
 * Judges the measures of a report with the given rules; null when the report was made by
 * another version of measures or judge, so that a difference would prove nothing.
 */
export type Rejudge = (report: CheckReport, rules: HouseRules) => Finding[] | null;

/** A report with more differences than this is no honest one; the rest adds nothing. */
const maxDifferences = 200;

/** Every finding of a report, those of its files too, as the judge would list them. */
export function findingsOf(report: CheckReport): Finding[] {
  return [
    ...report.files.flatMap((file) =>
      file.findings.map((finding) => ({ ...finding, files: [file.path] })),
    ),
    ...report.session.findings,
  ];
}

/**
 * Sets the findings somebody sent against those the server made of the same measures. Findings
 * are the same one when code, files and channel agree; everything else in them is compared.
 */
export function compareJudgements(
  sent: readonly Finding[],
  judged: readonly Finding[],
): Difference[] {
  const unmatched = new Map<string, Finding[]>();
  for (const finding of judged) {
    const identity = identityOf(finding);
    unmatched.set(identity, [...(unmatched.get(identity) ?? []), finding]);
  }
  const differences: Difference[] = [];
  for (const finding of sent) {
    const own = unmatched.get(identityOf(finding))?.shift();
    if (own && isDeepStrictEqual(own, finding)) continue;
    differences.push(differenceBetween(finding, own));
  }
  for (const finding of [...unmatched.values()].flat()) {
    differences.push(differenceBetween(undefined, finding));
  }
  return differences.slice(0, maxDifferences);
}

function identityOf({ code, files, channel }: Finding): string {
  return JSON.stringify([code, channel, files]);
}

function differenceBetween(sent: Finding | undefined, judged: Finding | undefined): Difference {
  const either = sent ?? judged;
  if (!either) throw new Error('a difference between nothing and nothing');
  return {
    code: either.code,
    files: either.files,
    sentLevel: sent?.level ?? null,
    judgedLevel: judged?.level ?? null,
  };
}
