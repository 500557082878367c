import type { RulerMark } from '../ui/strip.tsx';
import type { TimeView } from './lane.tsx';

/** Seconds as m:ss, with milliseconds where asked. */
export function clockTime(seconds: number, withMilliseconds = false): string {
  const total = withMilliseconds ? Math.round(seconds * 1000) / 1000 : Math.floor(seconds + 1e-6);
  const minutes = Math.floor(total / 60);
  const rest = total - minutes * 60;
  const text = withMilliseconds ? rest.toFixed(3).padStart(6, '0') : String(rest).padStart(2, '0');
  return `${String(minutes)}:${text}`;
}

export type BarGrid = {
  bpm: number;
  beatsPerBar: number;
  /** The metre's lower number: the beat's note value. */
  beatUnit: number;
  /** The bar number at the start line. */
  startBar: number;
};

/** A tempo counts quarter notes: a bar of 6/8 lasts three of them. */
export function secondsPerBar({ bpm, beatsPerBar, beatUnit }: BarGrid): number {
  return ((60 / bpm) * beatsPerBar * 4) / beatUnit;
}

/**
 * About eight marks over the visible stretch, at whole bars where there is a tempo, otherwise at
 * whole seconds. Steps double (bars) or take clock-like sizes (seconds) as the view grows.
 */
export function rulerMarks(view: TimeView, grid: BarGrid | null): RulerMark[] {
  const span = view.endSeconds - view.startSeconds;
  if (!(span > 0)) return [];
  const unit = grid ? secondsPerBar(grid) : 1;
  const steps = grid
    ? Array.from({ length: 16 }, (_, power) => 2 ** power)
    : [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 1800, 3600];
  const step = steps.find((candidate) => span / (candidate * unit) <= 9) ?? steps.at(-1)!;
  const marks: RulerMark[] = [];
  const first = Math.ceil(view.startSeconds / (step * unit) - 1e-9);
  for (let index = first; ; index++) {
    const seconds = index * step * unit;
    if (seconds > view.endSeconds + 1e-9) return marks;
    const at = (seconds - view.startSeconds) / span;
    const time = clockTime(seconds);
    // A label that would run over the right edge is left out; the end line says where it is.
    if (at > 0.94) return marks;
    marks.push(
      grid ? { at, label: String(grid.startBar + index * step), time } : { at, label: time },
    );
  }
}
