import { memo, useEffect, useMemo, useRef, useState, type ReactNode, type RefObject } from 'react';
import type { Overview } from '#shared/measure/overview.ts';
import { Button } from '../ui/button.tsx';
import { Strip, StripRuler, StripSheet } from '../ui/strip.tsx';
import { fileName } from './file-name.ts';
import { Lane } from './lane.tsx';
import { markOf } from './finding-anchor.ts';
import { LaneMarks, sharedMarks, type Mark } from './lane-marks.tsx';
import { rulerMarks, type BarGrid } from './time-axis.ts';
import type { TimeView } from './time-view.ts';
import { useTimeView } from './use-time-view.ts';
import type { ViewedFile, ViewedSession } from './viewed-session.ts';

type SideBySideProps = {
  view: ViewedSession;
  overviews: ReadonlyMap<string, Overview>;
  /** What was asked to be shown; a new object asks anew. */
  place: ShownPlace | null;
  /** A mark was pressed: show the finding with this anchor. */
  onFinding: (anchor: string) => void;
};

/** A finding's file, and its first place in seconds where it has one. */
export type ShownPlace = { path: string; code: string; seconds: number | null };

/** The picture: every track from one start line on one time axis, findings at their place. */
export function SideBySide({ view: session, overviews, place, onFinding }: SideBySideProps) {
  const sheet = useRef<HTMLDivElement>(null);
  const tracks = session.files.filter((file) => file.format !== null);
  const songSeconds = Math.max(
    0.001,
    ...tracks.map(({ format }) => format!.frames / format!.sampleRateHz),
  );
  const { view, isWhole, actions, show, onKeyDown } = useTimeView(songSeconds, sheet);
  const shared = useMemo(() => sharedMarks(session), [session]);
  useShownPlace(place, show);
  const isNarrow = useIsNarrow(sheet);
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
        <StripRuler marks={rulerMarks(view, barGrid(session), isNarrow ? 3 : 9)} />
        {tracks.map((file) => (
          <TrackStrip
            key={file.path}
            file={file}
            shared={shared.get(file.path) ?? none}
            isShown={place?.path === file.path}
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

/** Whether the sheet is as narrow as on a phone, where eight times do not fit side by side. */
function useIsNarrow(sheet: RefObject<HTMLElement | null>): boolean {
  const [isNarrow, setIsNarrow] = useState(false);
  useEffect(() => {
    const element = sheet.current;
    if (!element) return;
    const sizes = new ResizeObserver(() => setIsNarrow(element.clientWidth < 640));
    sizes.observe(element);
    return () => sizes.disconnect();
  }, [sheet]);
  return isNarrow;
}

/** One object for all strips without such marks, so that they are not drawn again for nothing. */
const none: readonly Mark[] = [];

/** Moves the view and the keyboard to the place; the mark there leads back to the finding. */
function useShownPlace(place: ShownPlace | null, show: (seconds: number) => void): void {
  const latestShow = useRef(show);
  useEffect(() => {
    latestShow.current = show;
  }, [show]);
  useEffect(() => {
    if (!place) return;
    if (place.seconds !== null) latestShow.current(place.seconds);
    const frame = requestAnimationFrame(() => {
      const mark = document.getElementById(markOf(place.path, place.code));
      mark?.closest('.strip')?.scrollIntoView({ block: 'nearest' });
      mark?.focus({ preventScroll: true });
    });
    return () => cancelAnimationFrame(frame);
  }, [place]);
}

type TrackStripProps = {
  file: ViewedFile;
  shared: readonly Mark[];
  isShown: boolean;
  overview: Overview | undefined;
  view: TimeView;
  songSeconds: number;
  onFinding: SideBySideProps['onFinding'];
};

const TrackStrip = memo(function TrackStrip({
  file,
  shared,
  isShown,
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
      className={isShown ? 'bg-wash' : ''}
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
      <LaneMarks file={file} shared={shared} view={view} onFinding={onFinding} />
    </Strip>
  );
});

function barGrid({ information }: ViewedSession): BarGrid | null {
  const { tempo, metre, startBar } = information;
  const bpm = tempo?.kind === 'fixed' ? tempo.bpm : null;
  return bpm === null ? null : { bpm, beatsPerBar: metre.beats, beatUnit: metre.unit, startBar };
}
