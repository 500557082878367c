import {
  useCallback,
  useEffect,
  useMemo,
  useState,
  type KeyboardEvent,
  type RefObject,
} from 'react';
import { centredOn, panned, withinSong, zoomed, type TimeView } from './time-view.ts';

const closer = 0.6;
const wider = 1 / closer;

/** About a bar: a place is seen with what lies around it. */
const shownSeconds = 2;

/** Zoom and pan of the picture, by wheel, keys and buttons. The lanes lie in `sheet`. */
export function useTimeView(songSeconds: number, sheet: RefObject<HTMLElement | null>) {
  // Null is the whole song, however long it becomes while files are still read.
  const [chosen, setChosen] = useState<TimeView | null>(null);
  // The same object as long as nothing moves, so that lanes are not drawn again for nothing.
  const view = useMemo(
    (): TimeView =>
      chosen ? withinSong(chosen, songSeconds) : { startSeconds: 0, endSeconds: songSeconds },
    [chosen, songSeconds],
  );

  const change = useCallback(
    (next: (view: TimeView) => TimeView) =>
      setChosen((before) => {
        const changed = next(before ?? { startSeconds: 0, endSeconds: songSeconds });
        return changed.endSeconds - changed.startSeconds >= songSeconds ? null : changed;
      }),
    [songSeconds],
  );

  useEffect(() => {
    const element = sheet.current;
    if (!element) return;
    const onWheel = (event: WheelEvent): void => {
      const lane =
        event.target instanceof Element
          ? event.target.closest('.strip-lane, .strip-ruler-lane')
          : null;
      if (!lane) return;
      const box = lane.getBoundingClientRect();
      const sideways = event.shiftKey ? event.deltaY : event.deltaX;
      // A plain wheel scrolls the page; with Ctrl (or a pinch) it zooms, sideways it pans.
      if (event.ctrlKey || event.metaKey) {
        const at = (event.clientX - box.left) / box.width;
        change((before) => zoomed(before, Math.exp(event.deltaY * 0.004), at, songSeconds));
      } else if (Math.abs(sideways) > Math.abs(event.shiftKey ? 0 : event.deltaY)) {
        change((before) => panned(before, sideways / box.width, songSeconds));
      } else return;
      event.preventDefault();
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [sheet, change, songSeconds]);

  const show = useCallback(
    (seconds: number) =>
      change((before) => {
        const span = before.endSeconds - before.startSeconds;
        const close = Math.min(span, Math.max(songSeconds / 8, shownSeconds));
        const half = close / 2;
        return centredOn(
          { startSeconds: seconds - half, endSeconds: seconds + half },
          seconds,
          songSeconds,
        );
      }),
    [change, songSeconds],
  );

  const actions = {
    closer: () => change((before) => zoomed(before, closer, 0.5, songSeconds)),
    wider: () => change((before) => zoomed(before, wider, 0.5, songSeconds)),
    earlier: () => change((before) => panned(before, -0.25, songSeconds)),
    later: () => change((before) => panned(before, 0.25, songSeconds)),
    whole: () => setChosen(null),
  };
  const keys: Record<string, () => void> = {
    '+': actions.closer,
    '=': actions.closer,
    '-': actions.wider,
    ArrowLeft: actions.earlier,
    ArrowRight: actions.later,
    '0': actions.whole,
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const action = keys[event.key];
    if (!action || event.ctrlKey || event.metaKey || event.altKey) return;
    action();
    event.preventDefault();
  };
  return { view, isWhole: chosen === null, actions, show, onKeyDown };
}
