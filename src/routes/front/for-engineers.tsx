import { ButtonLink } from '../../ui/button.tsx';
import { TapeLabel } from '../../ui/tape-label.tsx';

const rules: readonly [string, string][] = [
  ['Sample rate', '48 kHz'],
  ['Bit depth', '24 bit or more'],
  ['Start', 'all files together'],
  ['Rough mix', 'must come along'],
  ['Clean signal', 'for bass and guitars'],
];

/** The other half of the product: saying once how files must arrive. */
export function ForEngineers() {
  return (
    <section
      id="engineers"
      aria-labelledby="engineers-title"
      className="mt-16 scroll-mt-6 rounded-panel bg-wash px-5 py-9 sm:mt-24 sm:px-10 sm:py-12"
    >
      <div className="grid items-center gap-x-16 gap-y-9 lg:grid-cols-[minmax(0,6fr)_minmax(0,5fr)]">
        <div>
          <h2 id="engineers-title" className="text-section">
            For engineers: say once how files must arrive.
          </h2>
          <p className="mt-4">
            Your house rules become a page that artists can read, and a check that they can run. It
            tells them what is wrong before anything is sent, in words that need no engineer to
            explain them, and what reaches you has been looked through, named your way and packed
            with its checksums.
          </p>
          <p className="mt-3">
            Every edition is numbered and stays readable, so both sides know what was agreed when
            the song was packed.
          </p>
          <div className="mt-6 flex flex-wrap gap-3">
            <ButtonLink to="/found-studio" kind="primary">
              Found a studio
            </ButtonLink>
            <ButtonLink to="/check" className="bg-transparent">
              Try the check first
            </ButtonLink>
          </div>
        </div>
        <figure className="rounded-panel border border-line bg-sheet px-5 py-5 shadow-lift sm:px-7">
          <figcaption className="flex flex-wrap items-baseline justify-between gap-x-4">
            <span className="font-semibold">Harbour Lane Mixing</span>
            <span className="text-small text-ink-2">house rules, edition 1</span>
          </figcaption>
          <dl className="mt-3 text-small">
            {rules.map(([what, how]) => (
              <div key={what} className="flex justify-between gap-6 border-t border-line py-2">
                <dt className="text-ink-2">{what}</dt>
                <dd className="text-right font-medium">{how}</dd>
              </div>
            ))}
            <div className="border-t border-line pt-3">
              <dt className="text-ink-2">Names</dt>
              <dd className="mt-2 flex flex-wrap gap-2.5">
                {['D Kick In', 'B Bass DI', 'G Guitar Rhythm L', 'V Lead Vocal'].map((name) => (
                  <TapeLabel key={name} name={name} size="small" />
                ))}
              </dd>
            </div>
          </dl>
        </figure>
      </div>
    </section>
  );
}
