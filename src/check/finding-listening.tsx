import { useState, type ReactNode } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import { Button } from '../ui/button.tsx';
import { useBenchHere } from './bench-context.ts';
import { CloseUp } from './close-up.tsx';
import type { ViewedSession } from './viewed-session.ts';

/** The close-up of a finding that has places, where the files are at hand. */
export function Listening({
  finding,
  view,
  onShow,
}: {
  finding: Finding;
  view: ViewedSession;
  onShow?: ((finding: Finding) => void) | undefined;
}): ReactNode {
  const bench = useBenchHere();
  const [shown, setShown] = useState(false);
  const [path] = finding.files;
  const format = view.files.find((file) => file.path === path)?.format;
  if (path === undefined || !format || finding.perFile) return null;
  const canListen = bench !== null && finding.ranges.length > 0;
  return (
    <>
      <div className="mt-1 -ms-3 flex flex-wrap gap-1">
        {canListen && !shown && (
          <Button size="small" kind="quiet" onClick={() => setShown(true)}>
            Look closer and listen
          </Button>
        )}
        {onShow && (
          <Button size="small" kind="quiet" onClick={() => onShow(finding)}>
            Show in the picture
          </Button>
        )}
      </div>
      {canListen && shown && (
        <>
          <CloseUp bench={bench} finding={finding} path={path} sampleRateHz={format.sampleRateHz} />
          {loudCodes.has(finding.code) && (
            <p className="mt-1 text-micro text-ink-2">Turn the volume down before you listen.</p>
          )}
        </>
      )}
    </>
  );
}

/** Findings whose sound can startle. */
const loudCodes: ReadonlySet<Finding['code']> = new Set([
  'clipped',
  'flat-tops',
  'over-full-scale',
  'starts-on-sound',
  'ends-on-sound',
  'dropout',
  'not-a-number',
]);
