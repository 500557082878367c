import { requestAddressChange } from '#shared/api/accounts.ts';
import { useState } from 'react';
import { call } from '../../app/api-client.ts';
import { emailWords, givenPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm, wrongPassword } from '../../app/form.tsx';
import { Field } from '../../ui/field.tsx';
import { PasswordInput, TextInput } from '../../ui/text-input.tsx';
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
      <Field label="New address" error={form.mistake('newEmail')}>
        {(control) => (
          <TextInput
            {...control}
            {...form.register('newEmail')}
            type="email"
            inputMode="email"
            autoComplete="email"
          />
        )}
      </Field>
      <Field
        label="Password"
        hint="So that nobody else moves your account from an open browser."
        error={form.mistake('password')}
      >
        {(control) => (
          <PasswordInput
            {...control}
            {...form.register('password')}
            autoComplete="current-password"
          />
        )}
      </Field>
    </Form>
  );
}
