import type { SessionCheck, RepairedSession } from '../check.ts';
import type { Finding } from '../findings/finding.ts';
import { allFindings } from '../judge/all-findings.ts';
import { judgeVersion } from '../judge/judge-session.ts';
import { measureVersion } from '../measure/measures.ts';
import { folderName } from '../naming/folder-name.ts';
import { safeNamePart } from '../naming/safe-names.ts';
import { hashRules } from '../rules/canonical-json.ts';
import type { HouseRules } from '../rules/house-rules.ts';
import type { MeasuredFile } from '../session/measured-file.ts';
import { judgedFiles } from '../session/judged-files.ts';
import type { SessionInformation } from '../session/session-information.ts';
import { reportSchemaVersion, type CheckReport, type ReportEntry } from './check-report.ts';
import { describeRepairs } from './describe-repairs.ts';
import { fitReport } from './fit-report.ts';

export type ReportInput = {
  check: SessionCheck;
  repaired: RepairedSession;
  rules: HouseRules;
  information: SessionInformation;
  engine: 'wasm' | 'oracle';
};

/**
 * Writes down what was found and what is packed. No clock, no chance and no name of a person or
 * machine is in it: the same check makes the same report. Never longer than `maxReportBytes`.
 */
export async function buildReport(input: ReportInput): Promise<CheckReport> {
  const { check, repaired, information } = input;
  const { judgement } = check;
  const { plan, after } = repaired;
  const repairs = describeRepairs(plan, check.files);
  return fitReport({
    schema: reportSchemaVersion,
    measureVersion,
    judgeVersion,
    rulesHash: await hashRules(input.rules),
    engine: input.engine,
    verdict: after.judgement.verdict,
    verdictBeforeRepairs: judgement.verdict,
    information,
    files: judgedFiles(check.files).map((file, index) => {
      const judged = judgement.files[index]!;
      return {
        path: file.path,
        bytes: file.bytes,
        role: judged.role,
        reading: file.reading,
        format: file.format,
        measures: file.measures,
        group: judged.group,
        proposedName: judged.proposedName,
        findings: judged.findings.map(withoutFiles),
      };
    }),
    session: { ...judgement.session, comparison: check.comparison },
    package: {
      // Names are checked once more: a package must unpack anywhere.
      folderName: safeNamePart(folderName(input.rules.folder.template, information)),
      entries: plan.entries.map((entry, index) =>
        reportEntry(entry, repairs[index]!, after.files[index]!),
      ),
      leftOut: plan.leftOut,
      findings: allFindings(after.judgement),
      comparison: after.comparison,
    },
    counts: after.judgement.counts,
    shortened: 'nothing',
  });
}

/** A finding about one file stands with its file, so it does not repeat the path. */
function withoutFiles({ files: _files, perFile: _perFile, ...finding }: Finding) {
  return finding;
}

function reportEntry(
  { from, to, operations, rewriteAsWav }: RepairedSession['plan']['entries'][number],
  repairs: ReportEntry['repairs'],
  packed: MeasuredFile,
): ReportEntry {
  const remade = operations.length > 0 || rewriteAsWav;
  const format = packed.reading.kind === 'track' ? packed.reading.format : null;
  return {
    from,
    to,
    repairs,
    operations,
    bytes: packed.bytes,
    crc32: packed.measures?.crc32 ?? null,
    format: remade ? format : null,
    measures: remade ? packed.measures : null,
  };
}
