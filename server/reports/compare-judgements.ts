import { isDeepStrictEqual } from 'node:util';
import type { Difference } from '#shared/api/reports.ts';
import type { Finding } from '#shared/findings/finding.ts';
import { verdictOf, countLevels } from '#shared/judge/verdict.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { droppedFindings } from '#shared/report/compare-reports.ts';
import type { Rejudgement } from './rejudge.ts';

/** A report with more differences than this is no honest one; the rest adds nothing. */
const maxDifferences = 200;

/**
 * Whether verdicts and counts are what follows from the report's own findings. No honest report
 * says otherwise, unless findings had to be left away.
 */
export function isConsistent(report: CheckReport): boolean {
  if (report.shortened !== 'nothing' && report.shortened !== 'places') return true;
  return (
    report.verdict === verdictOf(report.package.findings) &&
    report.verdictBeforeRepairs === verdictOf(droppedFindings(report)) &&
    isDeepStrictEqual(report.counts, countLevels(report.package.findings))
  );
}

/** Sets what somebody sent against what the server found in the same measures. */
export function compareJudgements(report: CheckReport, judged: Rejudgement): Difference[] {
  return [
    ...compareFindings('dropped', droppedFindings(report), judged.dropped),
    ...compareFindings('packed', report.package.findings, judged.packed),
  ].slice(0, maxDifferences);
}

/** The same finding has the same code, files and channel; everything else in it is compared. */
function compareFindings(
  about: Difference['about'],
  sent: readonly Finding[],
  judged: readonly Finding[],
): Difference[] {
  const unmatched = new Map<string, Finding[]>();
  for (const finding of judged) {
    const identity = identityOf(finding);
    unmatched.set(identity, [...(unmatched.get(identity) ?? []), finding]);
  }
  const onlySent = sent.flatMap((finding) => {
    const own = unmatched.get(identityOf(finding))?.shift();
    return own && isSame(own, finding) ? [] : [differenceBetween(about, finding, own)];
  });
  const onlyJudged = [...unmatched.values()]
    .flat()
    .map((finding) => differenceBetween(about, undefined, finding));
  return [...onlySent, ...onlyJudged];
}

/** As JSON has them: a report has been through it. */
function isSame(judged: Finding, sent: Finding): boolean {
  return isDeepStrictEqual(JSON.parse(JSON.stringify(judged)), JSON.parse(JSON.stringify(sent)));
}

function identityOf({ code, files, channel }: Finding): string {
  return JSON.stringify([code, channel, files]);
}

function differenceBetween(
  about: Difference['about'],
  sent: Finding | undefined,
  judged: Finding | undefined,
): Difference {
  const either = sent ?? judged;
  if (!either) throw new Error('a difference between nothing and nothing');
  return {
    about,
    code: either.code,
    files: either.files.slice(0, 20),
    sentLevel: sent?.level ?? null,
    judgedLevel: judged?.level ?? null,
  };
}
