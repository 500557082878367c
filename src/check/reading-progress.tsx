import { Button } from '../ui/button.tsx';
import { Progress } from '../ui/progress.tsx';
import type { BenchState, ReadingProgress } from './bench-state.ts';
import { byteWords } from './byte-words.ts';
import { fileName } from './file-name.ts';

type ReadingProgressBarProps = { state: BenchState; onCancel: () => void };

const phaseWords: Partial<Record<BenchState['phase'], string>> = {
  'making-sample': 'Making the sample session',
  measuring: 'Listening to every file once',
  comparing: 'Holding the files side by side',
};

/** How far the reading is: the whole, and the files whose turn it is. */
export function ReadingProgressBar({ state, onCancel }: ReadingProgressBarProps) {
  const { progress, phase } = state;
  const reading = phase === 'measuring' ? progress : null;
  return (
    <section aria-label="Progress" className="flex flex-wrap items-center gap-x-6 gap-y-3">
      <div className="min-w-0 grow">
        <p className="mb-2 font-medium">{phaseWords[phase]}</p>
        <Progress
          label="Check"
          value={reading ? reading.bytesDone / Math.max(1, reading.bytes) : undefined}
        >
          {reading && progressWords(reading)}
        </Progress>
        {reading && reading.current.size > 0 && (
          <p className="mt-1 truncate text-small text-ink-2">
            {[...reading.current.keys()].map(fileName).join(', ')}
          </p>
        )}
      </div>
      <Button onClick={onCancel}>Cancel</Button>
    </section>
  );
}

function progressWords(progress: ReadingProgress): string {
  const { filesDone, files, bytesDone, bytes } = progress;
  const words = [
    `${String(filesDone)} of ${String(files)} files`,
    `${byteWords(bytesDone)} of ${byteWords(bytes)}`,
  ];
  const left = secondsLeft(progress);
  if (left !== null)
    words.push(left < 2 ? 'almost done' : `about ${String(Math.ceil(left))} s left`);
  return words.join(', ');
}

/** From the speed so far; null while that says little. */
function secondsLeft({ startedAt, bytesDone, bytes }: ReadingProgress): number | null {
  const elapsed = (performance.now() - startedAt) / 1000;
  if (elapsed < 1 || bytesDone === 0) return null;
  return (elapsed * (bytes - bytesDone)) / bytesDone;
}
