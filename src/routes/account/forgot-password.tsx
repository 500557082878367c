import { requestPasswordReset } from '#shared/api/accounts.ts';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { emailWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { AccountCard } from './account-card.tsx';
import { EmailField } from './account-fields.tsx';
import { MailSent } from './mail-sent.tsx';

/** `/forgot-password`: asks for the mail with the link to `/reset-password`. */
export function ForgotPasswordPage() {
  const [sentTo, setSentTo] = useState<string>();
  const form = useBodyForm({
    schema: requestPasswordReset.body,
    defaults: { email: '' },
    words: { email: emailWords },
    submit: async (body) => {
      await call(requestPasswordReset, { body });
      setSentTo(body.email);
    },
  });
  return (
    <AccountCard
      title="Set a new password"
      lead="Write the address of your account; the mail that comes has a link to choose a new one."
      otherWay={
        <p>
          It came back to you?{' '}
          <Link to="/sign-in" className="text-link">
            Sign in
          </Link>
          .
        </p>
      }
    >
      {sentTo === undefined ? (
        <Form form={form} submitWords="Send me the link" busyWords="Sending…">
          <EmailField
            autoComplete="username"
            error={form.mistake('email')}
            registration={form.register('email')}
          />
        </Form>
      ) : (
        <MailSent address={sentTo}>
          If the address has an account, its link lets you choose a new password.
        </MailSent>
      )}
    </AccountCard>
  );
}
