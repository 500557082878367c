import type { Finding } from '#shared/findings/finding.ts';
import type { CheckReport } from '#shared/report/check-report.ts';

/** Every finding of a report with the files it is about, session findings first. */
export function allFindings(report: CheckReport): Finding[] {
  return [
    ...report.session.findings,
    ...report.files.flatMap(({ path, findings }) =>
      findings.map((finding) => ({ ...finding, files: [path] })),
    ),
  ];
}

/** Names a finding apart from all others of the same report. */
export function findingKey({ code, files, channel }: Finding): string {
  return [code, channel ?? '', ...files].join('\n');
}
