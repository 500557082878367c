import { ButtonLink } from '../../ui/button.tsx';
import { useFrontTitle } from './front-title.ts';
import { Cautions } from './cautions.tsx';
import { ForEngineers } from './for-engineers.tsx';
import { StripPicture } from './strip-picture.tsx';
import { WhatItChecks } from './what-it-checks.tsx';

/** `/`: what this is and for whom, in ten seconds; then the picture, then the small print. */
export function FrontPage() {
  useFrontTitle();
  return (
    <div className="mx-auto w-full max-w-page px-4 sm:px-7">
      <div className="grid items-end gap-x-16 gap-y-6 pt-10 pb-9 sm:pt-16 sm:pb-12 lg:grid-cols-[minmax(0,7fr)_minmax(0,5fr)]">
        <h1 className="text-display">Multitracks, packed right before they travel.</h1>
        <div>
          <p className="text-lead">
            You recorded the song, somebody else mixes it. Drop the folder you exported: Flightcase
            shows what would hold up the mix, repairs what is safe to repair, and packs one clean
            zip that lines up in any session.
          </p>
          <div className="mt-5 flex flex-wrap gap-3">
            <ButtonLink to="/check" kind="primary" size="large">
              Check a folder now
            </ButtonLink>
            <ButtonLink to="/#engineers" size="large">
              For engineers
            </ButtonLink>
          </div>
          <p className="mt-4 text-small text-ink-2">
            No account needed. Nothing is uploaded: your files are read inside this browser.
          </p>
        </div>
      </div>
      <StripPicture />
      <WhatItChecks />
      <ForEngineers />
      <Cautions />
    </div>
  );
}
