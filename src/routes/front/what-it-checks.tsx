import { PackingSlip } from './packing-slip.tsx';

/** What a check looks at, in the words of what goes wrong. */
const checks: readonly { where: string; what: string }[] = [
  {
    where: 'The files',
    what: 'Damaged or cut short, compressed formats among the WAVs, a sample rate or bit depth that differs from the rest.',
  },
  {
    where: 'Start and length',
    what: 'Files that do not start together, end early, cut off a tail that still rings, or are loose clips instead of whole tracks.',
  },
  {
    where: 'The sound',
    what: 'Clipping, dropouts, edits that start on a sound, silent tracks, a side missing, both sides identical, the same sound upside down, one take sent twice.',
  },
  {
    where: 'The names',
    what: 'Names that nobody else can read at a glance, leftovers of the export, two files with one name, characters another computer refuses.',
  },
  {
    where: 'What is missing',
    what: 'The rough mix, the tempo, references, the clean signal beside an amp: whatever your engineer asks for.',
  },
];

const repairs: readonly string[] = [
  'gives every file a name your engineer can read, and you can change it',
  'adds silence where files end early, if their starts are proven to agree',
  'keeps one of two identical sides, joins left and right, splits what has too many channels',
  'rewrites AIFF as WAV, sample for sample',
  'fades, moves or turns down one file at a time, after you listened to before and after',
];

const never: readonly string[] = [
  'uploads anything during a check',
  'touches the files on your disk: repairs happen while the zip is written',
  'converts a sample rate, or “improves” a sound',
  'changes a sample that no repair you chose has to change',
];

function Lines({ title, items, mark }: { title: string; items: readonly string[]; mark: string }) {
  return (
    <div>
      <h3 className="text-heading">{title}</h3>
      <ul className="mt-3 flex flex-col gap-2.5">
        {items.map((item) => (
          <li key={item} className="grid grid-cols-[1.25rem_1fr] gap-x-2">
            <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true" className="mt-1.5">
              <path d={mark} fill="none" stroke="var(--case)" strokeWidth="2" />
            </svg>
            <span>{item}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}

/** What is looked at, what comes out, what is mended, what never happens. */
export function WhatItChecks() {
  return (
    <section aria-labelledby="checks" className="pt-16 sm:pt-24">
      <div className="grid items-start gap-x-16 gap-y-12 lg:grid-cols-[minmax(0,1fr)_24rem]">
        <div>
          <h2 id="checks" className="text-section">
            What it looks at
          </h2>
          <dl className="mt-5 border-t-2 border-case">
            {checks.map(({ where, what }) => (
              <div
                key={where}
                className="grid gap-x-8 gap-y-0.5 border-b border-line py-4 sm:grid-cols-[9.5rem_minmax(0,1fr)]"
              >
                <dt className="font-semibold">{where}</dt>
                <dd>{what}</dd>
              </div>
            ))}
          </dl>
        </div>
        <PackingSlip />
      </div>
      <div className="mt-14 grid gap-x-16 gap-y-10 md:grid-cols-2">
        <Lines title="It mends, if you want" items={repairs} mark="M2.5 8.5 6.5 12.5 13.5 4" />
        <Lines title="It never" items={never} mark="M3 8H13" />
      </div>
    </section>
  );
}
