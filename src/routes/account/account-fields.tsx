import type { ReactNode } from 'react';
import type { UseFormRegisterReturn } from 'react-hook-form';
import { Field } from '../../ui/field.tsx';
import { PasswordInput, TextInput } from '../../ui/text-input.tsx';

type AccountFieldProps = {
  label?: string;
  hint?: ReactNode;
  error: string | undefined;
  registration: UseFormRegisterReturn;
};

type EmailFieldProps = AccountFieldProps & {
  /** `username` where the address signs in, so that password managers find their entry. */
  autoComplete: 'username' | 'email';
};

export function EmailField({
  label = 'E-mail address',
  error,
  registration,
  autoComplete,
  hint,
}: EmailFieldProps) {
  return (
    <Field label={label} hint={hint} error={error}>
      {(control) => (
        <TextInput
          {...control}
          {...registration}
          type="email"
          inputMode="email"
          autoComplete={autoComplete}
        />
      )}
    </Field>
  );
}

/** The password one has. */
export function CurrentPasswordField({
  label = 'Password',
  error,
  registration,
  hint,
}: AccountFieldProps) {
  return (
    <Field label={label} hint={hint} error={error}>
      {(control) => (
        <PasswordInput {...control} {...registration} autoComplete="current-password" />
      )}
    </Field>
  );
}

/** Choosing a password: what it needs is said before, it can be seen and pasted. */
export function NewPasswordField({ label = 'Password', error, registration }: AccountFieldProps) {
  return (
    <Field
      label={label}
      hint="12 characters or more; a short sentence works well. Spaces are fine."
      error={error}
    >
      {(control) => <PasswordInput {...control} {...registration} autoComplete="new-password" />}
    </Field>
  );
}
