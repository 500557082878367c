import type { ReactNode } from 'react';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import { levels, type Finding } from '#shared/findings/finding.ts';
import { apart } from '#shared/findings/shared-line.ts';
import { LevelIcon, levelWords } from '../ui/level-mark.tsx';
import { anchorOf, markOf } from './finding-anchor.ts';
import { clockTime } from './time-axis.ts';
import type { TimeView } from './time-view.ts';
import type { ViewedFile, ViewedSession } from './viewed-session.ts';

type LaneMarksProps = {
  file: ViewedFile;
  /** Its part of lines that stand for many files. */
  shared: readonly Mark[];
  view: TimeView;
  onFinding: (anchor: string) => void;
};

/** A finding at a track, and the anchor of the line that says it. */
export type Mark = { finding: Finding; anchor: string };

/** The places of lines that stand for many files, by the path of each of them. */
export function sharedMarks({ session }: Pick<ViewedSession, 'session'>): Map<string, Mark[]> {
  const marks = new Map<string, Mark[]>();
  for (const line of session.findings) {
    const anchor = anchorOf(line);
    for (const finding of line.perFile ? apart(line) : []) {
      const path = finding.files[0] ?? '';
      if (finding.ranges.length === 0) continue;
      marks.set(path, [...(marks.get(path) ?? []), { finding, anchor }]);
    }
  }
  return marks;
}

/** Marks closer together than this part of the lane stand side by side instead of on top. */
const crowdedWithin = 0.025;

/** One mark a finding, at its first place in view; findings about the whole file at its start. */
export function LaneMarks({ file, shared, view, onFinding }: LaneMarksProps): ReactNode {
  const { sampleRateHz } = file.format!;
  const span = view.endSeconds - view.startSeconds;
  const own = file.findings.map((ofFile): Mark => {
    const finding = { ...ofFile, files: [file.path] };
    return { finding, anchor: anchorOf(finding) };
  });
  const marks = [...own, ...shared]
    .flatMap(({ finding, anchor }) => {
      const places = finding.ranges.length > 0 ? finding.ranges : [{ startFrame: 0, endFrame: 1 }];
      const seen = places.find(
        ({ startFrame, endFrame }) =>
          endFrame / sampleRateHz >= view.startSeconds &&
          startFrame / sampleRateHz <= view.endSeconds,
      );
      if (!seen) return [];
      const seconds = seen.startFrame / sampleRateHz;
      const at = Math.max(0, (seconds - view.startSeconds) / span);
      return [{ finding, anchor, seconds, at }];
    })
    .sort(
      (a, b) => a.at - b.at || levels.indexOf(a.finding.level) - levels.indexOf(b.finding.level),
    );
  let crowd = 0;
  return marks.map(({ finding, anchor, seconds, at }, index) => {
    const before = marks[index - 1];
    crowd = before && at - before.at < crowdedWithin ? crowd + 1 : 0;
    const { title } = describeFinding(finding);
    // Near the right edge the row of marks grows to the left.
    const shift = (at > 0.9 ? -1 : 1) * crowd * 1.375;
    return (
      <button
        key={`${finding.code} ${String(finding.channel)}`}
        id={markOf(file.path, finding.code)}
        type="button"
        className="absolute top-0 flex size-6 items-center justify-center rounded-slight hover:bg-wash"
        style={{
          insetInlineStart: `calc(clamp(0.875rem, ${String(at * 100)}%, 100% - 0.875rem) - 0.75rem + ${String(shift)}rem)`,
        }}
        title={title}
        aria-label={`${levelWords[finding.level]}: ${title}, ${clockTime(seconds)}`}
        onClick={() => onFinding(anchor)}
      >
        <LevelIcon level={finding.level} />
      </button>
    );
  });
}
