import { resetPassword } from '#shared/api/accounts.ts';
import { toastDone } from '../../ui/toast.tsx';
import { ChoosePassword } from './choose-password.tsx';

/** `/reset-password#token=…`: a new password; every other session ends. */
export function ResetPasswordPage() {
  return (
    <ChoosePassword
      linkPath="/reset-password"
      endpoint={resetPassword}
      title="Choose a new password"
      lead="Every device that is signed in now will be signed out, except this one."
      fieldLabel="New password"
      submitWords="Set the new password"
      busyWords="Setting it…"
      askAgainPath="/forgot-password"
      titleWithoutLink="Set a new password"
      onDone={() => {
        toastDone('Your new password is set. All other devices are signed out.');
      }}
    />
  );
}
