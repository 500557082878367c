import { useEffect, useRef } from 'react';
import type { Overview } from '#shared/measure/overview.ts';

/** The stretch of the common time axis that is on screen, in seconds from the start line. */
export type TimeView = { startSeconds: number; endSeconds: number };

type LaneProps = {
  overview: Overview;
  frames: number;
  sampleRateHz: number;
  view: TimeView;
};

/** The waveform of one file, drawn from its overview: lowest and highest sample a pixel column. */
export function Lane({ overview, frames, sampleRateHz, view }: LaneProps) {
  const canvas = useRef<HTMLCanvasElement>(null);

  useEffect(() => {
    const element = canvas.current;
    if (!element) return;
    const draw = (): void => drawLane(element, { overview, frames, sampleRateHz, view });
    draw();
    const sizes = new ResizeObserver(draw);
    sizes.observe(element);
    // The wave's colour is a token, so it is drawn again when the theme changes.
    const themes = new MutationObserver(draw);
    themes.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    const system = matchMedia('(prefers-color-scheme: dark)');
    system.addEventListener('change', draw);
    return () => {
      sizes.disconnect();
      themes.disconnect();
      system.removeEventListener('change', draw);
    };
  }, [overview, frames, sampleRateHz, view]);

  return (
    <canvas ref={canvas} aria-hidden="true" className="absolute inset-0 size-full text-wave" />
  );
}

function drawLane(
  canvas: HTMLCanvasElement,
  { overview, frames, sampleRateHz, view }: LaneProps,
): void {
  const ratio = devicePixelRatio;
  const width = Math.round(canvas.clientWidth * ratio);
  const height = Math.round(canvas.clientHeight * ratio);
  if (width === 0 || height === 0) return;
  canvas.width = width;
  canvas.height = height;
  const context = canvas.getContext('2d');
  if (!context) return;
  context.fillStyle = getComputedStyle(canvas).color;

  const columns = overview.channels[0] ? overview.channels[0].length / 2 : 0;
  const secondsPerColumn = overview.framesPerColumn / sampleRateHz;
  const secondsPerPixel = (view.endSeconds - view.startSeconds) / width;
  const middle = height / 2;
  const reach = (height / 2) * 0.86;
  const end = frames / sampleRateHz;

  for (let x = 0; x < width; x++) {
    const from = view.startSeconds + x * secondsPerPixel;
    if (from >= end) break;
    const first = Math.max(0, Math.floor(from / secondsPerColumn));
    const last = Math.min(
      columns - 1,
      Math.max(first, Math.ceil((from + secondsPerPixel) / secondsPerColumn) - 1),
    );
    let low = 0;
    let high = 0;
    for (const channel of overview.channels) {
      for (let column = first; column <= last; column++) {
        low = Math.min(low, channel[2 * column]!);
        high = Math.max(high, channel[2 * column + 1]!);
      }
    }
    // Silence still shows as a hairline: the file is there, only nothing sounds.
    const top = middle - (high / 127) * reach;
    const bottom = middle - (low / 127) * reach;
    context.fillRect(x, top, 1, Math.max(bottom - top, ratio * 0.75));
  }
}
