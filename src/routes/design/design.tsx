import { useState, type ReactNode } from 'react';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { Figures } from '../../ui/figure.tsx';
import { LevelIcon, LevelMark, levelWords, type Level } from '../../ui/level-mark.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { Strip, StripRuler, StripSheet } from '../../ui/strip.tsx';
import { TapeLabel } from '../../ui/tape-label.tsx';
import { ThemeSwitch } from '../../ui/theme-switch.tsx';
import { Colours } from './colours.tsx';
import { ControlSamples } from './control-samples.tsx';
import { OverlaySamples } from './overlay-samples.tsx';
import { StateSamples } from './state-samples.tsx';
import { TableSample } from './table-sample.tsx';

/** One kind of thing, with a sentence on when it is used. */
function Sample({ title, use, children }: { title: string; use: string; children: ReactNode }) {
  return (
    <section className="grid gap-x-12 gap-y-4 border-t border-line py-8 lg:grid-cols-[15rem_minmax(0,1fr)]">
      <div>
        <h2 className="text-heading">{title}</h2>
        <p className="mt-1 text-small text-ink-2">{use}</p>
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  );
}

const typeScale: readonly { name: string; className: string; words: string }[] = [
  { name: 'display', className: 'text-display font-semibold', words: 'Packed right' },
  { name: 'title', className: 'text-title font-semibold', words: 'Salt on the Windows' },
  { name: 'section', className: 'text-section font-semibold', words: 'What it looks at' },
  { name: 'heading', className: 'text-heading font-semibold', words: 'House rules, edition 1' },
  { name: 'lead', className: 'text-lead', words: 'Drop the folder you exported.' },
  { name: 'body', className: 'text-body', words: 'Both sides are identical: one is enough.' },
  { name: 'small', className: 'text-small', words: 'Every file from the same start.' },
  { name: 'micro', className: 'text-micro', words: 'Track 01 (3) KikIn' },
  { name: 'figures', className: 'figures text-body', words: '3:25.714  −11.2 dBFS  48 000 Hz' },
];

const levels: readonly Level[] = ['must-fix', 'look', 'note'];

/** `/design`: the design language, alive. Linked from nowhere; for the people who build this. */
export function DesignPage() {
  usePageTitle('Design language');
  const [wave] = useState(() => sampleWave());
  return (
    <Page>
      <PageHeader
        title="Design language"
        meta="Paper, ink, one deep green; console tape for names; everything lashed to one start line."
        actions={<ThemeSwitch />}
      />
      <Sample title="Type" use="Plex Sans for words, Plex Mono for time, samples and levels.">
        <dl className="flex flex-col gap-4">
          {typeScale.map(({ name, className, words }) => (
            <div
              key={name}
              className="grid items-baseline gap-x-6 sm:grid-cols-[6rem_minmax(0,1fr)]"
            >
              <dt className="figures text-small text-ink-2">{name}</dt>
              <dd className={className}>{words}</dd>
            </div>
          ))}
        </dl>
      </Sample>
      <Sample
        title="Colours"
        use="Measured where they meet, in the theme you see now. Text needs 4.5, marks and borders of controls need 3."
      >
        <Colours />
      </Sample>
      <Sample title="Tape label" use="The name of a track, a part, a song, a zip. Nothing else.">
        <div className="flex flex-wrap items-end gap-4">
          <TapeLabel name="D Kick In" size="small" />
          <TapeLabel name="V Lead Vocal" />
          <TapeLabel name="Гитара ритм Л" />
          <TapeLabel name="Salt on the Windows" size="large" />
        </div>
        <div className="mt-4 max-w-64">
          <TapeLabel name="Velvet Tramline - Salt on the Windows - 112 BPM.zip" />
        </div>
        <div className="mt-4 max-w-64">
          <TapeLabel name="Velvet Tramline - Salt on the Windows - 112 BPM.zip" wrap />
        </div>
      </Sample>
      <Sample title="Levels" use="Told by shape and word as well as by colour.">
        <ul className="flex flex-wrap gap-x-8 gap-y-3">
          {levels.map((level) => (
            <li key={level} className="flex items-center gap-4">
              <LevelIcon level={level} sizePx={28} />
              <LevelMark level={level}>{levelWords[level]}</LevelMark>
            </li>
          ))}
        </ul>
      </Sample>
      <Sample title="Strips" use="Files side by side, from one start line.">
        <div className="rounded-panel border border-line bg-sheet px-4 pb-4 sm:px-6">
          <StripSheet endLine>
            <StripRuler
              marks={[
                { at: 0, label: '1', time: '0:00' },
                { at: 0.5, label: '49', time: '1:42' },
              ]}
            />
            {['D Kick In', 'B Bass DI', 'V Harmony High Double Left Take Four'].map((name, row) => (
              <Strip
                key={name}
                name={name}
                detail={['Track 01 (3) KikIn', 'Bass DI_03', 'BGV hi'][row]}
              >
                <svg
                  viewBox="0 0 1000 40"
                  preserveAspectRatio="none"
                  aria-hidden="true"
                  className="absolute inset-0 size-full py-1"
                >
                  <path d={wave} className="fill-wave" />
                </svg>
              </Strip>
            ))}
          </StripSheet>
        </div>
      </Sample>
      <Sample title="Controls" use="Buttons say what happens. At least 32 pixels high.">
        <ControlSamples />
      </Sample>
      <Sample title="Figures and tables" use="Numbers stand right, with their units.">
        <Figures items={['112 BPM', '48 kHz', '24 bit', '3:25.714 = 96 bars', '12 files']} />
        <div className="mt-4">
          <TableSample />
        </div>
      </Sample>
      <Sample title="Overlays" use="From a well-kept headless library, never by hand.">
        <OverlaySamples />
      </Sample>
      <Sample title="States" use="Empty, loading, failed, done: every list has all of them.">
        <StateSamples />
      </Sample>
    </Page>
  );
}

/** A plain outline to hang in a lane. */
function sampleWave(): string {
  const at = (column: number) =>
    1 + 15 * Math.abs(Math.sin(column * 0.31)) * Math.abs(Math.sin(column * 0.017));
  const columns = Array.from({ length: 251 }, (_, column) => column);
  const upper = columns.map((column) => `${String(column * 4)} ${(20 - at(column)).toFixed(1)}`);
  const lower = columns
    .map((column) => `${String(column * 4)} ${(20 + at(column)).toFixed(1)}`)
    .reverse();
  return `M${upper.join('L')}L${lower.join('L')}Z`;
}
