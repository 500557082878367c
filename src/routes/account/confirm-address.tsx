import { confirmAddressChange } from '#shared/api/accounts.ts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../app/api-client.ts';
import { ErrorPanel } from '../../app/error-panel.tsx';
import { useLinkToken } from '../../app/link-token.ts';
import { sessionQuery } from '../../app/session-query.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { DoneNotice } from '../../ui/states.tsx';
import { AccountCard } from './account-card.tsx';
import { LostLink } from './lost-link.tsx';

const title = 'Confirm your new address';

/**
 * `/confirm-address#token=…`. The change is made by a button and not by opening the page,
 * because mail programs open links by themselves to look behind them.
 */
export function ConfirmAddressPage() {
  const token = useLinkToken('/confirm-address');
  const client = useQueryClient();
  const confirm = useMutation({
    mutationFn: () => call(confirmAddressChange, { body: { token: token ?? '' } }),
    onSuccess: () => client.invalidateQueries({ queryKey: sessionQuery.queryKey }),
  });
  if (token === undefined)
    return (
      <LostLink title={title} action={<ButtonLink to="/account">Go to your account</ButtonLink>} />
    );
  if (confirm.isSuccess)
    return (
      <AccountCard title="Your address has changed">
        <DoneNotice>
          <p>
            From now on you sign in with{' '}
            <strong className="font-semibold wrap-anywhere">{confirm.data.email}</strong>. Your
            other devices are signed out.
          </p>
        </DoneNotice>
        <div className="mt-5">
          <ButtonLink to="/account">Go to your account</ButtonLink>
        </div>
      </AccountCard>
    );
  return (
    <AccountCard
      title={title}
      lead="With this step the address that this link was sent to becomes the one you sign in with."
    >
      <div className="flex flex-col items-start gap-5">
        {confirm.isError && <ErrorPanel error={confirm.error} />}
        <Button
          kind="primary"
          busy={confirm.isPending}
          onClick={() => {
            confirm.mutate();
          }}
        >
          Use this address
        </Button>
      </div>
    </AccountCard>
  );
}
