import type { ReactNode } from 'react';
import { LevelIcon, type Level } from '../ui/level-mark.tsx';
import { Figures } from '../ui/figure.tsx';
import { byteWords } from './byte-words.ts';
import { stepCounts } from './findings-panel.tsx';
import { clockTime, secondsPerBar } from './time-axis.ts';
import type { ViewedSession } from './viewed-session.ts';

type ReportHeaderProps = {
  title: string;
  view: ViewedSession;
  /** What the last reading took; a stored report does not say. */
  reading?: { ms: number; bytes: number } | null;
  children?: ReactNode;
};

/** The song in a line of figures, and what there is to do in another. */
export function ReportHeader({ title, view, reading = null, children }: ReportHeaderProps) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4 px-4 py-6 sm:px-7">
      <div className="min-w-0">
        <h1 className="text-title">{title}</h1>
        <Figures items={figuresOf(view, reading)} />
      </div>
      <div className="flex flex-wrap items-center gap-x-5 gap-y-3">
        {stepCounts(view).map(({ step, count, words, level }) => (
          <StepCount key={step} level={level}>
            {`${String(count)} ${words}`}
          </StepCount>
        ))}
        {children}
      </div>
    </header>
  );
}

function StepCount({ level, children }: { level: Level; children: ReactNode }) {
  return (
    <span className="inline-flex items-center gap-2 font-medium">
      <LevelIcon level={level} />
      {children}
    </span>
  );
}

function figuresOf(
  { information, session, files }: ViewedSession,
  reading: ReportHeaderProps['reading'],
): string[] {
  const { tempo, metre } = information;
  const figures: string[] = [];
  if (tempo?.kind === 'fixed') figures.push(`${String(tempo.bpm)} BPM`);
  if (session.sampleRateHz !== null) figures.push(`${String(session.sampleRateHz / 1000)} kHz`);
  if (session.bits !== null) figures.push(`${String(session.bits)} bit`);
  if (session.frames !== null && session.sampleRateHz !== null) {
    const seconds = session.frames / session.sampleRateHz;
    const bars =
      tempo?.kind === 'fixed'
        ? seconds /
          secondsPerBar({
            bpm: tempo.bpm,
            beatsPerBar: metre.beats,
            beatUnit: metre.unit,
            startBar: 1,
          })
        : null;
    figures.push(
      clockTime(seconds, true) +
        (bars === null ? '' : ` = ${bars.toFixed(1).replace('.0', '')} bars`),
    );
  }
  figures.push(files.length === 1 ? '1 file' : `${String(files.length)} files`);
  if (reading) {
    figures.push(`${byteWords(reading.bytes)} read in ${(reading.ms / 1000).toFixed(1)} s`);
  } else figures.push(byteWords(files.reduce((sum, file) => sum + file.bytes, 0)));
  return figures;
}
