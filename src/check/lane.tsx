import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useRef } from 'react';
import type { Overview } from '#shared/measure/overview.ts';
import { useBenchHere } from './bench-context.ts';
import { drawLane, overviewPeaks, type Peaks } from './draw-lane.ts';
import { laneDetailQuery } from './lane-detail.ts';
import type { TimeView } from './time-view.ts';
import type { ViewedFile } from './viewed-session.ts';

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
    draw();
    const sizes = new ResizeObserver(draw);
    sizes.observe(element);
    // Colours are tokens, so the lane is drawn again when the theme changes.
    const themes = new MutationObserver(draw);
    themes.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    const system = matchMedia('(prefers-color-scheme: dark)');
    system.addEventListener('change', draw);
    return () => {
      sizes.disconnect();
      themes.disconnect();
      system.removeEventListener('change', draw);
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
