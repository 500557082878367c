import type { SessionCheck } from '#shared/check.ts';
import type { Finding, FindingCode } from '#shared/findings/finding.ts';
import type { CheckReport, ReportFile } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { SessionInformation } from '#shared/session/session-information.ts';

export type ViewedFile = Pick<
  ReportFile,
  'path' | 'bytes' | 'role' | 'format' | 'group' | 'proposedName' | 'findings'
>;

/**
 * What picture and findings are drawn from: a check that is still running, a finished one, or a
 * stored report, which has all of this and more.
 */
export type ViewedSession = {
  information: SessionInformation;
  files: readonly ViewedFile[];
  session: Pick<CheckReport['session'], 'sampleRateHz' | 'bits' | 'frames' | 'findings'>;
};

/** A check as it is seen, files in the order of their instrument groups. */
export function viewCheck(
  { files, judgement }: SessionCheck,
  information: SessionInformation,
  rules: HouseRules,
): ViewedSession {
  const viewed = files.map((file, index): ViewedFile => {
    const { role, group, proposedName, findings } = judgement.files[index]!;
    return {
      path: file.path,
      bytes: file.bytes,
      role,
      format: file.reading.kind === 'track' ? file.reading.format : null,
      group,
      proposedName,
      findings,
    };
  });
  return { information, files: inGroupOrder(viewed, rules), session: judgement.session };
}

/** As a console is laid out: groups as the rules order them, unknown parts last, then by name. */
export function inGroupOrder<File extends Pick<ViewedFile, 'group' | 'path' | 'proposedName'>>(
  files: readonly File[],
  rules: HouseRules,
): File[] {
  const places = new Map(rules.names.groups.map(({ id }, place) => [id, place]));
  const placeOf = ({ group }: File): number => places.get(group ?? '') ?? places.size;
  const nameOf = ({ proposedName, path }: File): string => proposedName ?? path;
  return [...files].sort(
    (a, b) => placeOf(a) - placeOf(b) || nameOf(a).localeCompare(nameOf(b), 'en'),
  );
}

/** Every finding with the files it is about, session findings first. */
export function allFindings({ files, session }: ViewedSession): Finding[] {
  return [
    ...session.findings,
    ...files.flatMap(({ path, findings }) =>
      findings.map((finding) => ({ ...finding, files: [path] })),
    ),
  ];
}

/** Names a finding apart from all others of the same session. */
export function findingKey({
  code,
  files,
  channel,
}: Pick<Finding, 'code' | 'files' | 'channel'>): string {
  return [code, channel ?? '', ...files].join('\n');
}

/**
 * The newer view with every file that shows the same as before as the same object, so that only
 * what changed is drawn again.
 */
export function keepUnchanged(before: ViewedSession | null, view: ViewedSession): ViewedSession {
  if (!before) return view;
  const known = new Map(before.files.map((file) => [file.path, file]));
  const files = view.files.map((file) => {
    const same = known.get(file.path);
    return same && showsTheSame(same, file) ? same : file;
  });
  return { ...view, files };
}

/** A file that was not measured again has the same format object and places as before. */
function showsTheSame(a: ViewedFile, b: ViewedFile): boolean {
  return (
    a.format === b.format &&
    a.role === b.role &&
    a.group === b.group &&
    a.proposedName === b.proposedName &&
    a.findings.length === b.findings.length &&
    a.findings.every((finding, index) => {
      const other = b.findings[index]!;
      return finding.code === other.code && finding.level === other.level;
    })
  );
}

/** What one file shows whatever the others are; the rest waits until all are measured. */
const ownCodes: ReadonlySet<FindingCode> = new Set<FindingCode>([
  ...(['unreadable', 'cut-short', 'changed-while-read', 'not-wav', 'lossy'] as const),
  ...(['too-many-channels', 'dual-mono', 'sides-cancel', 'one-side-silent'] as const),
  ...(['clipped', 'flat-tops', 'over-full-scale', 'above-ceiling', 'silent'] as const),
  ...(['starts-on-sound', 'ends-on-sound', 'tail-cut', 'dc-offset', 'not-a-number'] as const),
  ...(['name-breaks-rule', 'name-unclear', 'export-leftover'] as const),
]);

/** A check that is still reading: findings of single files only, so that nothing is taken back. */
export function viewUnfinished(
  check: SessionCheck,
  information: SessionInformation,
  rules: HouseRules,
): ViewedSession {
  const view = viewCheck(check, information, rules);
  return {
    ...view,
    files: view.files.map((file) => ({
      ...file,
      findings: file.findings.filter(({ code }) => ownCodes.has(code)),
    })),
    session: { ...view.session, findings: [] },
  };
}
