import { requestAddressChange } from '#shared/api/accounts.ts';
import { useState } from 'react';
import { call } from '../../app/api-client.ts';
import { emailWords, givenPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm, wrongPassword } from '../../app/form.tsx';
import { CurrentPasswordField, EmailField } from './account-fields.tsx';
import { MailSent } from './mail-sent.tsx';

export function ChangeAddress() {
  const [sentTo, setSentTo] = useState<string>();
  const form = useBodyForm({
    schema: requestAddressChange.body,
    defaults: { newEmail: '', password: '' },
    words: { newEmail: emailWords, password: givenPasswordWords },
    submit: async (body) => {
      await call(requestAddressChange, { body });
      form.reset();
      setSentTo(body.newEmail);
    },
    refusedField: wrongPassword('password'),
  });
  if (sentTo !== undefined)
    return (
      <MailSent address={sentTo}>Until its link is opened, your address stays what it is.</MailSent>
    );
  return (
    <Form form={form} submitWords="Send the link" busyWords="Sending…" submitKind="plain">
      <EmailField
        label="New address"
        autoComplete="email"
        error={form.mistake('newEmail')}
        registration={form.register('newEmail')}
      />
      <CurrentPasswordField
        hint="So that nobody else moves your account from an open browser."
        error={form.mistake('password')}
        registration={form.register('password')}
      />
    </Form>
  );
}
