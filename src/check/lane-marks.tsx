import type { ReactNode } from 'react';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import { levels } from '#shared/findings/finding.ts';
import { LevelIcon, levelWords } from '../ui/level-mark.tsx';
import { clockTime } from './time-axis.ts';
import type { TimeView } from './time-view.ts';
import type { ViewedFile } from './viewed-session.ts';

type LaneMarksProps = {
  file: ViewedFile;
  view: TimeView;
  onFinding: (path: string, code: string) => void;
};

/** Marks closer together than this part of the lane stand side by side instead of on top. */
const crowdedWithin = 0.025;

/** One mark a finding, at its first place in view; findings about the whole file at its start. */
export function LaneMarks({ file, view, onFinding }: LaneMarksProps): ReactNode {
  const { sampleRateHz } = file.format!;
  const span = view.endSeconds - view.startSeconds;
  const marks = file.findings
    .flatMap((finding) => {
      const places = finding.ranges.length > 0 ? finding.ranges : [{ startFrame: 0, endFrame: 1 }];
      const seen = places.find(
        ({ startFrame, endFrame }) =>
          endFrame / sampleRateHz >= view.startSeconds &&
          startFrame / sampleRateHz <= view.endSeconds,
      );
      if (!seen) return [];
      const seconds = seen.startFrame / sampleRateHz;
      const at = Math.max(0, (seconds - view.startSeconds) / span);
      return [{ finding, seconds, at }];
    })
    .sort(
      (a, b) => a.at - b.at || levels.indexOf(a.finding.level) - levels.indexOf(b.finding.level),
    );
  let crowd = 0;
  return marks.map(({ finding, seconds, at }, index) => {
    const before = marks[index - 1];
    crowd = before && at - before.at < crowdedWithin ? crowd + 1 : 0;
    const { title } = describeFinding({ ...finding, files: [file.path] });
    // Near the right edge the row of marks grows to the left.
    const shift = (at > 0.9 ? -1 : 1) * crowd * 1.375;
    return (
      <button
        key={`${finding.code} ${String(finding.channel)}`}
        type="button"
        className="absolute top-0 flex size-6 items-center justify-center rounded-slight hover:bg-wash"
        style={{
          insetInlineStart: `calc(clamp(0.875rem, ${String(at * 100)}%, 100% - 0.875rem) - 0.75rem + ${String(shift)}rem)`,
        }}
        title={title}
        aria-label={`${levelWords[finding.level]}: ${title}, ${clockTime(seconds)}`}
        onClick={() => onFinding(file.path, finding.code)}
      >
        <LevelIcon level={finding.level} />
      </button>
    );
  });
}
