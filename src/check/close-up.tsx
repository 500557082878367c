import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState, useSyncExternalStore } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import { errorText } from '../app/error-text.ts';
import { Button } from '../ui/button.tsx';
import type { Bench } from './bench.ts';
import { drawSamples, type SampleDrawing } from './draw-samples.ts';
import { excerptQuery } from './excerpts.ts';
import { ListenButtons } from './listen-buttons.tsx';
import { clockTime } from './time-axis.ts';

type CloseUpProps = { bench: Bench; finding: Finding; path: string; sampleRateHz: number };

/** Milliseconds across the window, from single samples to the whole neighbourhood. */
const windowsMs = [1, 3, 10, 40, 150, 600, 2000] as const;
const firstWindow = 2;

/** The waveform around a place of a finding, what a chosen repair makes of it, and its sound. */
export function CloseUp({ bench, finding, path, sampleRateHz }: CloseUpProps) {
  const [place, setPlace] = useState(0);
  const [zoom, setZoom] = useState<number>(firstWindow);
  const plan = useSyncExternalStore(bench.subscribe, () => bench.getState().repaired?.plan ?? null);
  const range = finding.ranges[Math.min(place, finding.ranges.length - 1)];
  const middle = range ? range.startFrame : 0;
  const frames = Math.max(16, Math.round((windowsMs[zoom]! / 1000) * sampleRateHz));
  const startFrame = Math.max(0, middle - Math.floor(frames / 2));
  const { data, error } = useQuery(excerptQuery(bench, { path, startFrame, frames }, plan));
  if (!range) return null;
  const drawing = data && {
    ...data,
    markFrom: range.startFrame - startFrame,
    markTo: range.endFrame - startFrame,
  };
  const known = finding.ranges.length;
  return (
    <figure className="mt-3 rounded border border-line bg-paper">
      <Samples drawing={drawing} words={`Waveform at ${clockTime(middle / sampleRateHz, true)}`} />
      <figcaption className="figures flex flex-wrap justify-between gap-x-4 px-3 text-micro text-ink-2">
        <span>
          {clockTime(middle / sampleRateHz, true)}, frame {middle.toLocaleString('en')}
        </span>
        <span>
          {windowsMs[zoom]} ms wide{data?.after && ', repaired dashed'}
        </span>
      </figcaption>
      {error && <p className="px-3 py-1 text-small text-must">{errorText(error).title}</p>}
      <div className="flex flex-wrap items-center gap-1 p-2">
        <Button
          size="small"
          kind="quiet"
          disabled={zoom === 0}
          aria-label="Closer"
          onClick={() => setZoom(zoom - 1)}
        >
          Closer
        </Button>
        <Button
          size="small"
          kind="quiet"
          disabled={zoom === windowsMs.length - 1}
          onClick={() => setZoom(zoom + 1)}
        >
          Wider
        </Button>
        {known > 1 && (
          <span className="flex items-center gap-1">
            <Button
              size="small"
              kind="quiet"
              aria-label="Place before"
              disabled={place === 0}
              onClick={() => setPlace(place - 1)}
            >
              ‹
            </Button>
            <span className="figures text-micro text-ink-2">
              {place + 1} of {known}
            </span>
            <Button
              size="small"
              kind="quiet"
              aria-label="Next place"
              disabled={place === known - 1}
              onClick={() => setPlace(place + 1)}
            >
              ›
            </Button>
          </span>
        )}
        <ListenButtons
          bench={bench}
          path={path}
          middle={middle}
          sampleRateHz={sampleRateHz}
          plan={plan}
        />
      </div>
    </figure>
  );
}

function Samples({ drawing, words }: { drawing: SampleDrawing | undefined; words: string }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useEffect(() => {
    const element = canvas.current;
    if (!element || !drawing) return;
    const draw = (): void => {
      const style = getComputedStyle(element);
      const token = (name: string): string => style.getPropertyValue(name);
      drawSamples(element, drawing, {
        wave: token('color'),
        // Custom properties keep light-dark() unresolved; these elements carry the colours.
        after: getComputedStyle(element.nextElementSibling!).color,
        axis: getComputedStyle(element.nextElementSibling!).borderColor,
        mark: getComputedStyle(element.nextElementSibling!).backgroundColor,
      });
    };
    draw();
    const sizes = new ResizeObserver(draw);
    sizes.observe(element);
    return () => sizes.disconnect();
  }, [drawing]);
  return (
    <>
      <canvas ref={canvas} role="img" aria-label={words} className="h-28 w-full text-must" />
      <span hidden className="border border-line bg-must text-case" />
    </>
  );
}
