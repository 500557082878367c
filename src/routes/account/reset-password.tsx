import { resetPassword } from '#shared/api/accounts.ts';
import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { newPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { homePath } from '../../app/home-path.ts';
import { forgetLinkToken, useLinkToken } from '../../app/link-token.ts';
import { replaceSession } from '../../app/session-query.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { toastDone } from '../../ui/toast.tsx';
import { AccountCard } from './account-card.tsx';
import { LostLink } from './lost-link.tsx';
import { NewPasswordField } from './new-password-field.tsx';

const bodyWithoutToken = resetPassword.body.omit({ token: true });

/** `/reset-password#token=…`: a new password; every other session ends. */
export function ResetPasswordPage() {
  const token = useLinkToken('/reset-password');
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useBodyForm({
    schema: bodyWithoutToken,
    defaults: { password: '' },
    words: { password: newPasswordWords },
    submit: async ({ password }) => {
      const session = await call(resetPassword, { body: { token: token ?? '', password } });
      replaceSession(client, session);
      await navigate(homePath(session), { replace: true });
      forgetLinkToken('/reset-password');
      toastDone('Your new password is set. All other devices are signed out.');
    },
  });
  if (token === undefined)
    return (
      <LostLink
        title="Set a new password"
        action={<ButtonLink to="/forgot-password">Ask for a new link</ButtonLink>}
      />
    );
  return (
    <AccountCard
      title="Choose a new password"
      lead="Every device that is signed in now will be signed out, except this one."
    >
      <Form form={form} submitWords="Set the new password" busyWords="Setting it…">
        <NewPasswordField
          label="New password"
          error={form.mistake('password')}
          registration={form.register('password')}
        />
      </Form>
    </AccountCard>
  );
}
