import type { ReactNode } from 'react';
import { DoneNotice } from '../../ui/states.tsx';

type MailSentProps = { address: string; children: ReactNode };

/** Says that a mail is on its way, without saying whether the address has an account. */
export function MailSent({ address, children }: MailSentProps) {
  return (
    <DoneNotice>
      <p>
        A mail is on its way to <strong className="font-semibold wrap-anywhere">{address}</strong>.{' '}
        {children}
      </p>
      <p className="mt-2 text-small text-ink-2">
        Nothing there after a few minutes? Look among the unwanted mail, and check that the address
        above is right.
      </p>
    </DoneNotice>
  );
}
