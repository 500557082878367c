import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useRef } from 'react';
import type { Overview } from '#shared/measure/overview.ts';
import { useBenchHere } from './bench-context.ts';
import { drawLane, eraseLane, overviewPeaks, type Peaks } from './draw-lane.ts';
import { laneDetailQuery } from './lane-detail.ts';
import type { TimeView } from './time-view.ts';
import type { ViewedFile } from './viewed-session.ts';

/** How far outside the window lanes are drawn, so that scrolling finds them drawn. */
const drawnAround = '400px';

type LaneProps = { file: ViewedFile; overview: Overview; view: TimeView };

/**
 * The waveform of one file, lowest and highest sample a pixel column: from its overview, and when
 * that becomes too coarse from the file itself, of which then only this stretch is read again.
 */
export function Lane({ file, overview, view }: LaneProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const bench = useBenchHere();
  const { frames, sampleRateHz } = file.format!;
  const { data: detail } = useQuery(laneDetailQuery(bench, file, overview, view));
  const coarse = useMemo(() => overviewPeaks(overview, sampleRateHz), [overview, sampleRateHz]);
  const peaks: Peaks = detail ?? coarse;

  useEffect(() => {
    const element = canvas.current;
    if (!element) return;
    const places = file.findings.flatMap(({ level, ranges }) =>
      ranges.map(({ startFrame }) => ({ level, seconds: startFrame / sampleRateHz })),
    );
    const draw = (): void =>
      drawLane(element, { peaks, coarse, endSeconds: frames / sampleRateHz, view, places });
    // Of a thousand lanes some twenty are in view: the others hold no picture.
    let inView = false;
    const drawInView = (): void =>
      inView || matchMedia('print').matches ? draw() : eraseLane(element);
    // On paper everything is in view.
    addEventListener('beforeprint', draw);
    const visible = new IntersectionObserver(
      ([latest]) => {
        inView = latest?.isIntersecting ?? false;
        drawInView();
      },
      { rootMargin: drawnAround },
    );
    visible.observe(element);
    const sizes = new ResizeObserver(drawInView);
    sizes.observe(element);
    // Colours are tokens, so the lane is drawn again when the theme changes.
    const themes = new MutationObserver(drawInView);
    themes.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    const system = matchMedia('(prefers-color-scheme: dark)');
    system.addEventListener('change', drawInView);
    return () => {
      removeEventListener('beforeprint', draw);
      visible.disconnect();
      sizes.disconnect();
      themes.disconnect();
      system.removeEventListener('change', drawInView);
    };
  }, [
    peaks,
    coarse,
    frames,
    sampleRateHz,
    view.startSeconds,
    view.endSeconds,
    file.findings,
    view,
  ]);

  return (
    <canvas ref={canvas} aria-hidden="true" className="absolute inset-0 size-full text-wave" />
  );
}
