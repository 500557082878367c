import { useState, type ReactNode } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import { apart } from '#shared/findings/shared-line.ts';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import { answersFinding, RepairButtons, type FindingActions } from './finding-item.tsx';
import { Listening } from './finding-listening.tsx';
import { Place } from './finding-place.tsx';
import type { ViewedSession } from './viewed-session.ts';

type SharedFilesProps = FindingActions & { finding: Finding; view: ViewedSession };

/** The files a line stands for, each with its own words, places and repairs. */
export function SharedFiles({ finding, view, ...actions }: SharedFilesProps): ReactNode {
  // A hundred files are drawn only when somebody wants to see them.
  const [open, setOpen] = useState(false);
  const wholeTaken = actions.chosen?.some((repair) => answersFinding(repair, finding)) ?? false;
  return (
    <details
      className="mt-1 text-small"
      onToggle={({ currentTarget }) => setOpen(currentTarget.open)}
    >
      <summary className="cursor-pointer py-1 underline-offset-4 hover:underline">
        The {finding.files.length} files, one by one
      </summary>
      {open && (
        <ul className="mt-1 border-s-2 border-line ps-3">
          {apart(finding).map((own) => (
            <li key={own.files[0]} className="py-2">
              <Place finding={own} view={view} />
              <p className="mt-1 text-ink-2">{describeFinding(own).what}</p>
              <Listening finding={own} view={view} onShow={actions.onShow} />
              {actions.onChoose && !wholeTaken && own.repairs.length > 0 && (
                <div className="mt-1.5 flex flex-wrap items-center gap-2">
                  <RepairButtons finding={own} {...actions} />
                </div>
              )}
            </li>
          ))}
        </ul>
      )}
    </details>
  );
}
