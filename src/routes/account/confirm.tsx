import { confirmAccount } from '#shared/api/accounts.ts';
import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { newPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { homePath } from '../../app/home-path.ts';
import { forgetLinkToken, useLinkToken } from '../../app/link-token.ts';
import { replaceSession } from '../../app/session-query.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { AccountCard } from './account-card.tsx';
import { LostLink } from './lost-link.tsx';
import { NewPasswordField } from './new-password-field.tsx';

const bodyWithoutToken = confirmAccount.body.omit({ token: true });

/** `/confirm#token=…`: the address is proved, the password is chosen, the account is made. */
export function ConfirmPage() {
  const token = useLinkToken('/confirm');
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useBodyForm({
    schema: bodyWithoutToken,
    defaults: { password: '' },
    words: { password: newPasswordWords },
    submit: async ({ password }) => {
      const session = await call(confirmAccount, { body: { token: token ?? '', password } });
      replaceSession(client, session);
      await navigate(homePath(session), { replace: true });
      forgetLinkToken('/confirm');
    },
  });
  if (token === undefined)
    return (
      <LostLink
        title="Confirm your address"
        action={<ButtonLink to="/register">Ask for a new link</ButtonLink>}
      />
    );
  return (
    <AccountCard
      title="Choose a password"
      lead="Your address is confirmed with this step, and the account is made."
    >
      <Form form={form} submitWords="Make the account" busyWords="Making the account…">
        <NewPasswordField
          error={form.mistake('password')}
          registration={form.register('password')}
        />
      </Form>
    </AccountCard>
  );
}
