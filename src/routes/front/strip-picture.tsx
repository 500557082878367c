import { useId, useState } from 'react';
import { LevelIcon, LevelMark } from '../../ui/level-mark.tsx';
import { Strip, StripRuler, StripSheet } from '../../ui/strip.tsx';
import { illustratedRuler, illustratedSet, type IllustratedStrip } from './illustrated-set.ts';
import { waveOutline } from './wave-outline.ts';

type Stage = 'exported' | 'packed';

const outlines = illustratedSet.map((strip, index) => waveOutline(strip, index));

function Lane({
  strip,
  outline,
  stage,
}: {
  strip: IllustratedStrip;
  outline: string;
  stage: Stage;
}) {
  const { finding, endsAt } = strip;
  const marked = finding !== undefined && (stage === 'exported' || finding.level === 'must-fix');
  return (
    <>
      <svg
        viewBox="0 0 1000 40"
        preserveAspectRatio="none"
        aria-hidden="true"
        className="absolute inset-0 size-full py-1"
      >
        <path d={outline} className="fill-wave" />
        {endsAt !== undefined && stage === 'packed' && (
          <rect
            x={endsAt * 1000}
            y="19.6"
            width={(1 - endsAt) * 1000}
            height="0.8"
            className="fill-case"
          />
        )}
      </svg>
      {endsAt !== undefined && (
        <span
          aria-hidden="true"
          className={`absolute inset-y-1 right-0 border-l border-dashed ${stage === 'exported' ? 'hatched border-note' : 'border-transparent'}`}
          style={{ left: `${String(endsAt * 100)}%` }}
        />
      )}
      {marked && (
        <span
          aria-hidden="true"
          className="absolute top-1 flex -translate-x-1/2"
          style={{ left: `${String(finding.at * 100)}%` }}
        >
          <LevelIcon level={finding.level} halo />
        </span>
      )}
    </>
  );
}

/** The two stages as radio buttons, because that is what they are. */
function StageSwitch({ stage, onChange }: { stage: Stage; onChange: (stage: Stage) => void }) {
  const name = useId();
  const labels: Record<Stage, string> = { exported: 'As exported', packed: 'As packed' };
  return (
    <fieldset className="inline-flex rounded border border-edge bg-paper p-0.5">
      <legend className="sr-only">Show the example</legend>
      {(['exported', 'packed'] as const).map((value) => (
        <label
          key={value}
          className="relative rounded-slight px-4 py-1.5 text-small font-medium text-ink-2 hover:text-ink has-checked:bg-case has-checked:text-on-case has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-case"
        >
          <input
            type="radio"
            name={name}
            checked={value === stage}
            onChange={() => {
              onChange(value);
            }}
            className="absolute inset-0 appearance-none opacity-0"
          />
          {labels[value]}
        </label>
      ))}
    </fieldset>
  );
}

/** What was found, or what became of it, in sentences. */
function Findings({ stage }: { stage: Stage }) {
  return (
    <ul className="grid gap-x-8 gap-y-4 sm:grid-cols-2 lg:grid-cols-4" aria-live="polite">
      {illustratedSet.map((strip) => {
        const { finding } = strip;
        if (finding === undefined) return null;
        const mended = stage === 'packed' && finding.level !== 'must-fix';
        return (
          <li key={strip.packedName} className="text-small">
            <p className="font-semibold">
              {stage === 'exported' ? strip.exportedName : strip.packedName}
            </p>
            <div className="mt-0.5">
              {mended ? (
                <span className="inline-flex items-center gap-2 font-medium text-case">
                  <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
                    <path
                      d="M2.5 8.5 6.5 12.5 13.5 4"
                      fill="none"
                      stroke="currentColor"
                      strokeWidth="2.25"
                    />
                  </svg>
                  {finding.repaired === undefined ? 'answered' : 'fixed'}
                </span>
              ) : (
                <LevelMark level={finding.level} />
              )}
            </div>
            <p className="mt-1 text-ink-2">
              {stage === 'exported' ? finding.found : (finding.repaired ?? finding.remains)}
            </p>
          </li>
        );
      })}
    </ul>
  );
}

/** The picture that says what the product does: one song's files before and after. */
export function StripPicture() {
  const [stage, setStage] = useState<Stage>('exported');
  const strips = illustratedSet.map((strip, index) => ({ strip, outline: outlines[index] ?? '' }));
  return (
    <section
      aria-labelledby="example"
      className="rounded-panel border border-line bg-sheet shadow-float"
    >
      <header className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3 px-4 py-4 sm:px-7">
        <div>
          <h2 id="example" className="text-heading">
            Salt on the Windows
          </h2>
          <p className="figures text-small text-ink-2">
            {stage === 'exported'
              ? '8 files from a folder called “final export NEW”'
              : 'Velvet Tramline - Salt on the Windows - 112 BPM.zip'}
          </p>
        </div>
        <StageSwitch stage={stage} onChange={setStage} />
      </header>
      <div className="px-4 sm:px-7">
        <StripSheet>
          <StripRuler marks={illustratedRuler} />
          {strips.map(({ strip, outline }) => {
            const left = stage === 'packed' && strip.wave === 'none';
            return (
              <Strip
                key={strip.packedName}
                name={stage === 'exported' ? strip.exportedName : strip.packedName}
                detail={left ? 'left out' : undefined}
              >
                {left ? (
                  <span aria-hidden="true" className="hatched absolute inset-1" />
                ) : (
                  <Lane strip={strip} outline={outline} stage={stage} />
                )}
              </Strip>
            );
          })}
        </StripSheet>
      </div>
      <div className="px-4 py-6 sm:px-7">
        <Findings stage={stage} />
      </div>
    </section>
  );
}
