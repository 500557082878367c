import type { UseFormRegisterReturn } from 'react-hook-form';
import { Field } from '../../ui/field.tsx';
import { PasswordInput } from '../../ui/text-input.tsx';

type NewPasswordFieldProps = {
  label?: string;
  error: string | undefined;
  registration: UseFormRegisterReturn;
};

/** Choosing a password: what it needs is said before, it can be seen and pasted. */
export function NewPasswordField({
  label = 'Password',
  error,
  registration,
}: NewPasswordFieldProps) {
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
