import {
  findingCodes,
  maxSharedRanges,
  type Finding,
  type FindingCode,
} from '../findings/finding.ts';

/** Fewer files than this never share a line: in a set of three, two clipped files are two lines. */
const fewestFiles = 3;

/** What cuts all files at once leaves marks in only those that sound there. */
const leastShare: Partial<Record<FindingCode, number>> = {
  'starts-on-sound': 0.2,
  'ends-on-sound': 0.2,
  'tail-cut': 0.2,
};

/**
 * One line where at least half of the files share a finding. Lines of different level or answer
 * stay apart, and so do lines with different repairs on offer, because what is done about them
 * differs. `byFile` has the findings of each file; `filesInSession` is how many could have it.
 */
export function shareLines(
  byFile: readonly (readonly Finding[])[],
  filesInSession: number,
): { byFile: Finding[][]; shared: Finding[] } {
  const filesWith = new Map<FindingCode, number>();
  for (const findings of byFile) {
    for (const { code } of findings) filesWith.set(code, (filesWith.get(code) ?? 0) + 1);
  }
  const isShared = ({ code }: Finding): boolean => {
    const files = filesWith.get(code) ?? 0;
    return files >= fewestFiles && files >= filesInSession * (leastShare[code] ?? 0.5);
  };

  const lines = new Map<string, Finding[]>();
  for (const finding of byFile.flat()) {
    if (!isShared(finding)) continue;
    const key = [finding.code, finding.level, finding.answer, ...finding.repairs].join(' ');
    lines.set(key, [...(lines.get(key) ?? []), finding]);
  }
  const together = [...lines.values()];
  return {
    byFile: byFile.map((findings) =>
      findings.filter((finding) => !isShared(finding) || isAlone(finding, together)),
    ),
    shared: together.filter((line) => line.length > 1).map(oneLine),
  };
}

function isAlone(finding: Finding, lines: readonly Finding[][]): boolean {
  return lines.some((line) => line.length === 1 && line[0] === finding);
}

function oneLine(findings: readonly Finding[]): Finding {
  const [first] = findings as [Finding, ...Finding[]];
  const worst = findings.reduce((most, finding) => (finding.places > most.places ? finding : most));
  return {
    ...first,
    files: findings.flatMap((finding) => finding.files),
    channel: null,
    places: findings.reduce((sum, { places }) => sum + places, 0),
    ranges: [],
    args: worst.args,
    perFile: findings.map(({ files, channel, places, ranges, args }) => ({
      path: files[0] ?? '',
      channel,
      places,
      ranges: ranges.slice(0, maxSharedRanges),
      args,
    })),
  };
}

/** Sorts findings as their codes are listed; equal codes stay in order. */
export function inCodeOrder(findings: readonly Finding[]): Finding[] {
  return [...findings].sort((a, b) => findingCodes.indexOf(a.code) - findingCodes.indexOf(b.code));
}
