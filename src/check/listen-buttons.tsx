import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { RepairPlan } from '#shared/repair/repair-plan.ts';
import { Button } from '../ui/button.tsx';
import { toastFailed } from '../ui/toast.tsx';
import { errorText } from '../app/error-text.ts';
import { audition, stopAudition } from './audition.ts';
import type { Bench } from './bench.ts';
import { excerptQuery } from './excerpts.ts';

type ListenButtonsProps = {
  bench: Bench;
  path: string;
  /** The frame that is listened around, half a second to each side. */
  middle: number;
  sampleRateHz: number;
  plan: RepairPlan | null;
};

/** A second of sound around a place, as it is and as it will be, at a level that hurts nobody. */
export function ListenButtons({ bench, path, middle, sampleRateHz, plan }: ListenButtonsProps) {
  const queries = useQueryClient();
  const [playing, setPlaying] = useState<'before' | 'after' | null>(null);
  useEffect(() => stopAudition, []);
  const changed =
    (plan?.entries.find(({ from }) => from.includes(path))?.operations.length ?? 0) > 0;

  const listen = async (which: 'before' | 'after'): Promise<void> => {
    const startFrame = Math.max(0, middle - Math.round(sampleRateHz / 2));
    const place = { path, startFrame, frames: sampleRateHz };
    try {
      const excerpts = await queries.fetchQuery(excerptQuery(bench, place, plan));
      setPlaying(which);
      await audition((which === 'after' && excerpts.after) || excerpts.before, sampleRateHz);
    } catch (error) {
      toastFailed(errorText(error).title);
    } finally {
      setPlaying(null);
    }
  };

  return (
    <span className="ms-auto flex flex-wrap items-center gap-1">
      {(changed ? (['before', 'after'] as const) : (['before'] as const)).map((which) => (
        <Button
          key={which}
          size="small"
          onClick={() => (playing === which ? stopAudition() : void listen(which))}
        >
          {playing === which ? 'Stop' : changed ? `Listen ${which}` : 'Listen'}
        </Button>
      ))}
    </span>
  );
}
