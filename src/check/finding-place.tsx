import type { ReactNode } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import { TapeLabel } from '../ui/tape-label.tsx';
import { fileName } from './file-name.ts';
import { clockTime } from './time-axis.ts';
import type { ViewedSession } from './viewed-session.ts';

/** Which files, and where the first place is. */
export function Place({ finding, view }: { finding: Finding; view: ViewedSession }): ReactNode {
  const [path] = finding.files;
  const file = view.files.find((candidate) => candidate.path === path);
  const [first] = finding.ranges;
  const rate = file?.format?.sampleRateHz;
  const more = finding.places > 1 ? ' and on' : '';
  return (
    <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1 text-small">
      {finding.files.slice(0, 3).map((name) => (
        <TapeLabel key={name} name={fileName(name)} size="small" />
      ))}
      {finding.files.length > 3 && (
        <span className="text-ink-2">and {finding.files.length - 3} more</span>
      )}
      {first && rate !== undefined && (
        <span className="figures text-ink-2">
          {clockTime(first.startFrame / rate, true)}
          {more}
        </span>
      )}
    </p>
  );
}
