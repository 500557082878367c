import type { ReactNode } from 'react';
import type { Overview } from '#shared/measure/overview.ts';
import { LevelIcon } from '../ui/level-mark.tsx';
import { Strip, StripRuler, StripSheet } from '../ui/strip.tsx';
import { fileName } from './file-name.ts';
import { Lane, type TimeView } from './lane.tsx';
import { clockTime, rulerMarks, type BarGrid } from './time-axis.ts';
import type { ViewedFile, ViewedSession } from './viewed-session.ts';

type SideBySideProps = {
  view: ViewedSession;
  overviews: ReadonlyMap<string, Overview>;
  /** A mark was pressed: show that finding. */
  onFinding?: (path: string, code: string) => void;
};

/** The picture: every track from one start line on one time axis, findings at their place. */
export function SideBySide({ view: session, overviews, onFinding }: SideBySideProps) {
  const tracks = session.files.filter((file) => file.format !== null);
  const longestSeconds = Math.max(
    ...tracks.map(({ format }) => format!.frames / format!.sampleRateHz),
    0,
  );
  const view: TimeView = { startSeconds: 0, endSeconds: longestSeconds || 1 };
  return (
    <StripSheet endLine>
      <StripRuler marks={rulerMarks(view, barGrid(session))} />
      {tracks.map((file) => (
        <Strip
          key={file.path}
          name={file.proposedName ?? fileName(file.path)}
          detail={file.proposedName === null ? undefined : fileName(file.path)}
        >
          <TrackLane
            file={file}
            overview={overviews.get(file.path)}
            view={view}
            longestSeconds={longestSeconds}
          />
          <Marks file={file} view={view} onFinding={onFinding} />
        </Strip>
      ))}
    </StripSheet>
  );
}

type TrackLaneProps = {
  file: ViewedFile;
  overview: Overview | undefined;
  view: TimeView;
  longestSeconds: number;
};

function TrackLane({ file, overview, view, longestSeconds }: TrackLaneProps): ReactNode {
  const { frames, sampleRateHz } = file.format!;
  const endsAt =
    (frames / sampleRateHz - view.startSeconds) / (view.endSeconds - view.startSeconds);
  return (
    <>
      {overview && (
        <Lane overview={overview} frames={frames} sampleRateHz={sampleRateHz} view={view} />
      )}
      {frames / sampleRateHz < longestSeconds && (
        <div
          className="strip-missing absolute inset-y-2 end-0"
          style={{ insetInlineStart: `${String(endsAt * 100)}%` }}
        />
      )}
    </>
  );
}

/** One mark a finding, where its first place is; findings about the whole file at the start. */
function Marks({
  file,
  view,
  onFinding,
}: {
  file: ViewedFile;
  view: TimeView;
  onFinding: SideBySideProps['onFinding'];
}): ReactNode {
  const span = view.endSeconds - view.startSeconds;
  return file.findings.map((finding) => {
    const seconds = (finding.ranges[0]?.startFrame ?? 0) / file.format!.sampleRateHz;
    const at = (seconds - view.startSeconds) / span;
    if (at < 0 || at > 1) return null;
    return (
      <button
        key={`${finding.code}-${String(finding.channel)}`}
        type="button"
        className="absolute top-0 flex size-6 -translate-x-1/2 items-center justify-center rounded-slight hover:bg-wash"
        style={{ insetInlineStart: `clamp(0.75rem, ${String(at * 100)}%, calc(100% - 0.75rem))` }}
        aria-label={`${finding.level === 'must-fix' ? 'Must fix' : finding.level}: ${finding.code.replaceAll('-', ' ')}, ${clockTime(seconds)}`}
        onClick={() => onFinding?.(file.path, finding.code)}
      >
        <LevelIcon level={finding.level} />
      </button>
    );
  });
}

function barGrid({ information }: ViewedSession): BarGrid | null {
  const { tempo, metre, startBar } = information;
  const bpm = tempo?.kind === 'fixed' ? tempo.bpm : null;
  return bpm === null ? null : { bpm, beatsPerBar: metre.beats, beatUnit: metre.unit, startBar };
}
