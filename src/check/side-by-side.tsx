import { memo, useRef, type ReactNode } from 'react';
import type { Overview } from '#shared/measure/overview.ts';
import { Button } from '../ui/button.tsx';
import { Strip, StripRuler, StripSheet } from '../ui/strip.tsx';
import { fileName } from './file-name.ts';
import { Lane } from './lane.tsx';
import { LaneMarks } from './lane-marks.tsx';
import { rulerMarks, type BarGrid } from './time-axis.ts';
import type { TimeView } from './time-view.ts';
import { useTimeView } from './use-time-view.ts';
import type { ViewedFile, ViewedSession } from './viewed-session.ts';

type SideBySideProps = {
  view: ViewedSession;
  overviews: ReadonlyMap<string, Overview>;
  /** A mark was pressed: show that finding. */
  onFinding: (path: string, code: string) => void;
};

/** The picture: every track from one start line on one time axis, findings at their place. */
export function SideBySide({ view: session, overviews, onFinding }: SideBySideProps) {
  const sheet = useRef<HTMLDivElement>(null);
  const tracks = session.files.filter((file) => file.format !== null);
  const songSeconds = Math.max(
    0.001,
    ...tracks.map(({ format }) => format!.frames / format!.sampleRateHz),
  );
  const { view, isWhole, actions, onKeyDown } = useTimeView(songSeconds, sheet);
  return (
    <div
      ref={sheet}
      role="group"
      aria-label="All files side by side. Plus and minus zoom, arrows move, 0 shows the whole song."
      tabIndex={0}
      onKeyDown={onKeyDown}
      className="rounded focus-visible:outline-offset-8"
    >
      <div className="mb-2 flex flex-wrap justify-end gap-1">
        <Button size="small" kind="quiet" onClick={actions.closer}>
          Closer
        </Button>
        <Button size="small" kind="quiet" disabled={isWhole} onClick={actions.wider}>
          Wider
        </Button>
        <Button
          size="small"
          kind="quiet"
          disabled={isWhole}
          aria-label="Earlier"
          onClick={actions.earlier}
        >
          ‹
        </Button>
        <Button
          size="small"
          kind="quiet"
          disabled={isWhole}
          aria-label="Later"
          onClick={actions.later}
        >
          ›
        </Button>
        <Button size="small" kind="quiet" disabled={isWhole} onClick={actions.whole}>
          Whole song
        </Button>
      </div>
      <StripSheet endLine={isWhole}>
        <StripRuler marks={rulerMarks(view, barGrid(session))} />
        {tracks.map((file) => (
          <TrackStrip
            key={file.path}
            file={file}
            overview={overviews.get(file.path)}
            view={view}
            songSeconds={songSeconds}
            onFinding={onFinding}
          />
        ))}
      </StripSheet>
    </div>
  );
}

type TrackStripProps = {
  file: ViewedFile;
  overview: Overview | undefined;
  view: TimeView;
  songSeconds: number;
  onFinding: SideBySideProps['onFinding'];
};

const TrackStrip = memo(function TrackStrip({
  file,
  overview,
  view,
  songSeconds,
  onFinding,
}: TrackStripProps): ReactNode {
  const { path, proposedName, format } = file;
  const { frames, sampleRateHz } = format!;
  const ownName = fileName(path);
  const endsAt =
    (frames / sampleRateHz - view.startSeconds) / (view.endSeconds - view.startSeconds);
  const endsEarly = frames / sampleRateHz < songSeconds - 0.0005 && endsAt < 1;
  return (
    <Strip
      name={proposedName ?? ownName}
      detail={proposedName === null || proposedName === ownName ? undefined : ownName}
    >
      <div className="absolute inset-0 overflow-hidden">
        {overview && <Lane file={file} overview={overview} view={view} />}
        {endsEarly && (
          <div
            className="strip-missing absolute inset-y-2 end-0"
            style={{ insetInlineStart: `${String(Math.max(0, endsAt) * 100)}%` }}
          />
        )}
      </div>
      <LaneMarks file={file} view={view} onFinding={onFinding} />
    </Strip>
  );
});

function barGrid({ information }: ViewedSession): BarGrid | null {
  const { tempo, metre, startBar } = information;
  const bpm = tempo?.kind === 'fixed' ? tempo.bpm : null;
  return bpm === null ? null : { bpm, beatsPerBar: metre.beats, beatUnit: metre.unit, startBar };
}
