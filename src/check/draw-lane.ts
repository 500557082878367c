import type { Level } from '#shared/findings/finding.ts';
import type { Overview } from '#shared/measure/overview.ts';
import type { TimeView } from './time-view.ts';

/** Lowest and highest sample (full scale = 1) of equal stretches, one after the other. */
export type Peaks = {
  startSeconds: number;
  secondsPerColumn: number;
  low: Float32Array;
  high: Float32Array;
};

/** All channels of an overview drawn over each other. */
export function overviewPeaks(overview: Overview, sampleRateHz: number): Peaks {
  const columns = (overview.channels[0]?.length ?? 0) / 2;
  const low = new Float32Array(columns);
  const high = new Float32Array(columns);
  for (const channel of overview.channels) {
    for (let column = 0; column < columns; column++) {
      low[column] = Math.min(low[column]!, channel[2 * column]! / 127);
      high[column] = Math.max(high[column]!, channel[2 * column + 1]! / 127);
    }
  }
  const secondsPerColumn = overview.framesPerColumn / sampleRateHz;
  return { startSeconds: 0, secondsPerColumn, low, high };
}

/** Samples of a stretch put together to columns, all channels over each other. */
export function samplePeaks(
  channels: readonly Float32Array[],
  startFrame: number,
  sampleRateHz: number,
  mostColumns: number,
): Peaks {
  const frames = channels[0]?.length ?? 0;
  const framesPerColumn = Math.max(1, Math.ceil(frames / mostColumns));
  const columns = Math.ceil(frames / framesPerColumn);
  const low = new Float32Array(columns);
  const high = new Float32Array(columns);
  for (const channel of channels) {
    for (let frame = 0; frame < frames; frame++) {
      const column = Math.floor(frame / framesPerColumn);
      const sample = channel[frame]!;
      if (sample < low[column]!) low[column] = sample;
      if (sample > high[column]!) high[column] = sample;
    }
  }
  return {
    startSeconds: startFrame / sampleRateHz,
    secondsPerColumn: framesPerColumn / sampleRateHz,
    low,
    high,
  };
}

export type LaneDrawing = {
  peaks: Peaks;
  /** Drawn where `peaks` does not reach. */
  coarse: Peaks;
  endSeconds: number;
  view: TimeView;
  places: readonly { level: Level; seconds: number }[];
};

const levelTokens: Record<Level, string> = {
  'must-fix': '--must',
  look: '--look',
  note: '--note',
};

export function drawLane(canvas: HTMLCanvasElement, drawing: LaneDrawing): void {
  const ratio = devicePixelRatio;
  const width = Math.round(canvas.clientWidth * ratio);
  const height = Math.round(canvas.clientHeight * ratio);
  const context = canvas.getContext('2d');
  if (!context || width === 0 || height === 0) return;
  canvas.width = width;
  canvas.height = height;
  context.fillStyle = getComputedStyle(canvas).color;
  const { view, endSeconds, peaks, coarse } = drawing;
  const secondsPerPixel = (view.endSeconds - view.startSeconds) / width;
  const reach = (height / 2) * 0.86;

  for (let x = 0; x < width; x++) {
    const from = view.startSeconds + x * secondsPerPixel;
    if (from >= endSeconds) break;
    const [low, high] = peakBetween(
      covers(peaks, from) ? peaks : coarse,
      from,
      from + secondsPerPixel,
    );
    // Silence still shows as a hairline: the file is there, only nothing sounds.
    const top = height / 2 - Math.min(1, high) * reach;
    const bottom = height / 2 - Math.max(-1, low) * reach;
    context.fillRect(x, top, 1, Math.max(bottom - top, ratio * 0.75));
  }
  for (const { level, seconds } of drawing.places) {
    if (seconds < view.startSeconds || seconds > view.endSeconds) continue;
    context.fillStyle = tokenColour(canvas, levelTokens[level]);
    const x = (seconds - view.startSeconds) / secondsPerPixel;
    context.fillRect(x - ratio / 2, height - 5 * ratio, ratio * 1.5, 5 * ratio);
  }
}

/** Takes the picture away and gives its memory back. */
export function eraseLane(canvas: HTMLCanvasElement): void {
  if (canvas.width > 0) canvas.width = 0;
}

function covers({ startSeconds, secondsPerColumn, low }: Peaks, seconds: number): boolean {
  return seconds >= startSeconds && seconds < startSeconds + secondsPerColumn * low.length;
}

function peakBetween(peaks: Peaks, from: number, to: number): [number, number] {
  const { startSeconds, secondsPerColumn, low, high } = peaks;
  const first = Math.max(0, Math.floor((from - startSeconds) / secondsPerColumn));
  const last = Math.min(
    low.length - 1,
    Math.max(first, Math.ceil((to - startSeconds) / secondsPerColumn) - 1),
  );
  let lowest = 0;
  let highest = 0;
  for (let column = first; column <= last; column++) {
    lowest = Math.min(lowest, low[column]!);
    highest = Math.max(highest, high[column]!);
  }
  return [lowest, highest];
}

/** What a colour token is in this theme: custom properties themselves keep both. */
function tokenColour(element: HTMLElement, token: string): string {
  const before = element.style.color;
  element.style.color = `var(${token})`;
  const colour = getComputedStyle(element).color;
  element.style.color = before;
  return colour;
}
