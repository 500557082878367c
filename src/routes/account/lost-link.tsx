import type { ReactNode } from 'react';
import { AccountCard } from './account-card.tsx';

type LostLinkProps = { title: string; action: ReactNode };

/** The page was opened without the secret of its mail, or reloaded after it was read. */
export function LostLink({ title, action }: LostLinkProps) {
  return (
    <AccountCard title={title}>
      <p>
        This page is opened by the link in a mail. For your safety the secret part of the link is
        taken out of the address bar at once, so after a reload it is gone: open the link from the
        mail again.
      </p>
      <div className="mt-5 flex flex-wrap gap-2">{action}</div>
    </AccountCard>
  );
}
