import { confirmAccount } from '#shared/api/accounts.ts';
import { ChoosePassword } from './choose-password.tsx';

/** `/confirm#token=…`: the address is proved, the password is chosen, the account is made. */
export function ConfirmPage() {
  return (
    <ChoosePassword
      linkPath="/confirm"
      endpoint={confirmAccount}
      title="Choose a password"
      lead="Your address is confirmed with this step, and the account is made."
      fieldLabel="Password"
      submitWords="Make the account"
      busyWords="Making the account…"
      askAgainPath="/register"
      titleWithoutLink="Confirm your address"
    />
  );
}
