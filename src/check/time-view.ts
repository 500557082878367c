/** The stretch of the common time axis that is on screen, in seconds from the start line. */
export type TimeView = { startSeconds: number; endSeconds: number };

/** The closest view: a tenth of a second across; closer than that is the close-up's work. */
const shortestSeconds = 0.1;

/** The view, moved and cut so that it lies within the song. */
export function withinSong({ startSeconds, endSeconds }: TimeView, songSeconds: number): TimeView {
  const span = Math.min(Math.max(endSeconds - startSeconds, shortestSeconds), songSeconds);
  const start = Math.min(Math.max(0, startSeconds), songSeconds - span);
  return { startSeconds: start, endSeconds: start + span };
}

/** Closer (factor below 1) or wider, with the moment under `at` (0 to 1 across) staying in place. */
export function zoomed(view: TimeView, factor: number, at: number, songSeconds: number): TimeView {
  const span = view.endSeconds - view.startSeconds;
  const wanted = Math.min(Math.max(span * factor, shortestSeconds), songSeconds);
  const startSeconds = view.startSeconds + (span - wanted) * at;
  return withinSong({ startSeconds, endSeconds: startSeconds + wanted }, songSeconds);
}

/** Moved by a part of what is on screen: 0.25 is a quarter of it to the right. */
export function panned(view: TimeView, by: number, songSeconds: number): TimeView {
  const shift = (view.endSeconds - view.startSeconds) * by;
  return withinSong(
    { startSeconds: view.startSeconds + shift, endSeconds: view.endSeconds + shift },
    songSeconds,
  );
}

/** Around a moment, at the width of the view, for going from a finding to its place. */
export function centredOn(view: TimeView, seconds: number, songSeconds: number): TimeView {
  const half = (view.endSeconds - view.startSeconds) / 2;
  return withinSong({ startSeconds: seconds - half, endSeconds: seconds + half }, songSeconds);
}
