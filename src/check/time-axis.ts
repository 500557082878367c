import type { RulerMark } from '../ui/strip.tsx';
import type { TimeView } from './time-view.ts';

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
 * About eight marks (fewer where there is no room) over the visible stretch, at whole bars where there is a tempo, otherwise (or
 * when less than two bars are in view) at round times. Steps of bars double.
 */
export function rulerMarks(view: TimeView, grid: BarGrid | null, mostMarks = 9): RulerMark[] {
  const span = view.endSeconds - view.startSeconds;
  if (!(span > 0)) return [];
  const bars = grid && span >= 2 * secondsPerBar(grid) ? grid : null;
  const unit = bars ? secondsPerBar(bars) : 1;
  const steps = bars
    ? Array.from({ length: 16 }, (_, power) => 2 ** power)
    : [0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 1800, 3600];
  const step = steps.find((candidate) => span / (candidate * unit) <= mostMarks) ?? steps.at(-1)!;
  const marks: RulerMark[] = [];
  const first = Math.ceil((view.startSeconds / (step * unit)) * (1 - 1e-12) - 1e-9);
  for (let index = first; ; index++) {
    const seconds = index * step * unit;
    const at = (seconds - view.startSeconds) / span;
    // A label that would run over the right edge is left out.
    if (at > 0.94) return marks;
    const time = clockTime(seconds, step * unit < 1);
    marks.push(
      bars ? { at, label: String(bars.startBar + index * step), time } : { at, label: time },
    );
  }
}
