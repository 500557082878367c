import type { ReactNode } from 'react';
import { Page } from '../../app/shell.tsx';
import { usePageTitle } from '../../app/page-title.ts';

type AccountCardProps = {
  title: string;
  /** One or two sentences under the title. */
  lead?: ReactNode;
  children: ReactNode;
  /** Under the card: another way. */
  otherWay?: ReactNode;
};

/** One sheet with one form on it: sign in, register, reset and their kin. */
export function AccountCard({ title, lead, children, otherWay }: AccountCardProps) {
  usePageTitle(title);
  return (
    <Page narrow>
      <h1 className="text-title">{title}</h1>
      {lead !== undefined && <div className="mt-2 text-ink-2">{lead}</div>}
      <div className="mt-7 rounded-panel border border-line bg-sheet p-5 sm:p-7">{children}</div>
      {otherWay !== undefined && <div className="mt-5 text-ink-2">{otherWay}</div>}
    </Page>
  );
}
