import type { confirmAccount, resetPassword } from '#shared/api/accounts.ts';
import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { newPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { homePath } from '../../app/home-path.ts';
import { forgetLinkToken, useLinkToken } from '../../app/link-token.ts';
import { replaceSession } from '../../app/session-query.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { AccountCard } from './account-card.tsx';
import { NewPasswordField } from './account-fields.tsx';
import { LostLink } from './lost-link.tsx';

type ChoosePasswordProps = {
  /** Where the link of the mail leads; its secret is kept under this path. */
  linkPath: string;
  endpoint: typeof confirmAccount | typeof resetPassword;
  title: string;
  lead: string;
  fieldLabel: string;
  submitWords: string;
  busyWords: string;
  /** Where a new link is asked for, when this one's secret is gone. */
  askAgainPath: string;
  titleWithoutLink: string;
  /** Called on the page the person has arrived at. */
  onDone?: () => void;
};

/** A password chosen behind a link from a mail; whoever has done it is signed in. */
export function ChoosePassword({
  linkPath,
  endpoint,
  title,
  lead,
  fieldLabel,
  submitWords,
  busyWords,
  askAgainPath,
  titleWithoutLink,
  onDone,
}: ChoosePasswordProps) {
  const token = useLinkToken(linkPath);
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useBodyForm({
    schema: endpoint.body.omit({ token: true }),
    defaults: { password: '' },
    words: { password: newPasswordWords },
    submit: async ({ password }) => {
      const session = await call(endpoint, { body: { token: token ?? '', password } });
      replaceSession(client, session);
      await navigate(homePath(session), { replace: true });
      forgetLinkToken(linkPath);
      onDone?.();
    },
  });
  if (token === undefined)
    return (
      <LostLink
        title={titleWithoutLink}
        action={<ButtonLink to={askAgainPath}>Ask for a new link</ButtonLink>}
      />
    );
  return (
    <AccountCard title={title} lead={lead}>
      <Form form={form} submitWords={submitWords} busyWords={busyWords}>
        <NewPasswordField
          label={fieldLabel}
          error={form.mistake('password')}
          registration={form.register('password')}
        />
      </Form>
    </AccountCard>
  );
}
