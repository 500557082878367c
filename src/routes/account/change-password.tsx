import { changePassword } from '#shared/api/accounts.ts';
import { call } from '../../app/api-client.ts';
import { givenPasswordWords, newPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm, wrongPassword } from '../../app/form.tsx';
import { toastDone } from '../../ui/toast.tsx';
import { CurrentPasswordField, NewPasswordField } from './account-fields.tsx';

export function ChangePassword() {
  const form = useBodyForm({
    schema: changePassword.body,
    defaults: { currentPassword: '', newPassword: '' },
    words: { currentPassword: givenPasswordWords, newPassword: newPasswordWords },
    submit: async (body) => {
      await call(changePassword, { body });
      form.reset();
      toastDone('Your password is changed. Other devices are signed out.');
    },
    refusedField: wrongPassword('currentPassword'),
  });
  return (
    <Form form={form} submitWords="Change the password" busyWords="Changing it…" submitKind="plain">
      <CurrentPasswordField
        label="Password until now"
        error={form.mistake('currentPassword')}
        registration={form.register('currentPassword')}
      />
      <NewPasswordField
        label="New password"
        error={form.mistake('newPassword')}
        registration={form.register('newPassword')}
      />
    </Form>
  );
}
