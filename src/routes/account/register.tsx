import { register } from '#shared/api/accounts.ts';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { emailWords, lineWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { Button } from '../../ui/button.tsx';
import { Field } from '../../ui/field.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { AccountCard } from './account-card.tsx';
import { EmailField } from './account-fields.tsx';
import { MailSent } from './mail-sent.tsx';

/** `/register`: asks for the mail that proves the address; the password comes behind its link. */
export function RegisterPage() {
  const [sentTo, setSentTo] = useState<string>();
  const form = useBodyForm({
    schema: register.body,
    defaults: { name: '', email: '' },
    words: { name: lineWords('your name', 80), email: emailWords },
    submit: async (body) => {
      await call(register, { body });
      setSentTo(body.email);
    },
  });
  if (sentTo !== undefined)
    return (
      <AccountCard title="Look into your mail">
        <MailSent address={sentTo}>
          The link in it lets you choose a password, and then the account is yours.
        </MailSent>
        <div className="mt-5">
          <Button
            size="small"
            onClick={() => {
              setSentTo(undefined);
            }}
          >
            Correct the address
          </Button>
        </div>
      </AccountCard>
    );
  return (
    <AccountCard
      title="Make an account"
      lead="It keeps your reports and answers, lets you open the songs an engineer invited you to, and lets engineers found a studio. Checking a folder works without one."
      otherWay={
        <p>
          You have one?{' '}
          <Link to="/sign-in" className="text-link">
            Sign in
          </Link>
          .
        </p>
      }
    >
      <Form form={form} submitWords="Send me the link" busyWords="Sending…">
        <Field
          label="Your name"
          hint="As the people you work with should see it."
          error={form.mistake('name')}
        >
          {(control) => <TextInput {...control} {...form.register('name')} autoComplete="name" />}
        </Field>
        <EmailField
          hint="We send one mail there, to see that it is yours."
          autoComplete="email"
          error={form.mistake('email')}
          registration={form.register('email')}
        />
      </Form>
    </AccountCard>
  );
}
