import { acceptInvitation, readInvitation } from '#shared/api/invitations.ts';
import type { EndpointResponse } from '#shared/api/endpoint.ts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { ErrorPanel } from '../../app/error-panel.tsx';
import { lineWords, newPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { useLinkToken } from '../../app/link-token.ts';
import { dayWords } from '../../app/moments.ts';
import { replaceSession, useSession } from '../../app/session-query.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { Field } from '../../ui/field.tsx';
import { LoadingState } from '../../ui/states.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { AccountCard } from './account-card.tsx';
import { NewPasswordField } from './account-fields.tsx';
import { LostLink } from './lost-link.tsx';

type Invitation = EndpointResponse<typeof readInvitation>;
type Accepted = EndpointResponse<typeof acceptInvitation>;

const roleWords: Record<Invitation['role'], string> = {
  assistant: 'You will see the projects you are put on, and the deliveries in them.',
  artist: 'You will prepare the songs, read their reports and deliver them.',
  bandmate: 'You will help to prepare the songs and to deliver them.',
};

/** "Maren Holt invites you to work as an assistant at Harbour Lane Mixing." */
function invitationWords({ invitedBy, role, studioName, projectTitle }: Invitation): string {
  const place = projectTitle === null ? (studioName ?? 'a studio') : `“${projectTitle}”`;
  if (role === 'assistant') return `${invitedBy} invites you to be an assistant at ${place}.`;
  const as = role === 'artist' ? 'as the artist' : 'as a bandmate';
  const at = projectTitle !== null && studioName !== null ? ` at ${studioName}` : '';
  return `${invitedBy} invites you to ${place}${at}, ${as}.`;
}

function useAfterAccepting() {
  const client = useQueryClient();
  const navigate = useNavigate();
  return async ({ session, studioSlug, projectId }: Accepted) => {
    replaceSession(client, session);
    const projectPath = projectId === null ? '/projects' : `/projects/${projectId}`;
    await navigate(
      studioSlug !== null && projectId === null ? `/studio/${studioSlug}` : projectPath,
      {
        replace: true,
      },
    );
  };
}

/** Somebody signed in joins with the account they have. */
function JoinAsMyself({ token, name, email }: { token: string; name: string; email: string }) {
  const afterAccepting = useAfterAccepting();
  const accept = useMutation({
    mutationFn: () => call(acceptInvitation, { body: { token } }),
    onSuccess: afterAccepting,
  });
  return (
    <div className="flex flex-col items-start gap-5">
      <p>
        You are signed in as <strong className="font-semibold">{name}</strong> ({email}). The
        invitation joins this account.
      </p>
      {accept.isError && <ErrorPanel error={accept.error} />}
      <Button
        kind="primary"
        busy={accept.isPending}
        onClick={() => {
          accept.mutate();
        }}
      >
        Accept the invitation
      </Button>
    </div>
  );
}

const newAccountSchema = acceptInvitation.body.shape.newAccount.unwrap();

/** A visitor whose address has no account makes one here; the link has proved the address. */
function JoinWithNewAccount({ token, email }: { token: string; email: string }) {
  const afterAccepting = useAfterAccepting();
  const form = useBodyForm({
    schema: newAccountSchema,
    defaults: { name: '', password: '' },
    words: { name: lineWords('your name', 80), password: newPasswordWords },
    submit: async (newAccount) => {
      await afterAccepting(await call(acceptInvitation, { body: { token, newAccount } }));
    },
  });
  return (
    <Form form={form} submitWords="Accept the invitation" busyWords="Making the account…">
      <p>
        An account is made for <strong className="font-semibold wrap-anywhere">{email}</strong>.
      </p>
      <Field label="Your name" error={form.mistake('name')}>
        {(control) => <TextInput {...control} {...form.register('name')} autoComplete="name" />}
      </Field>
      <NewPasswordField error={form.mistake('password')} registration={form.register('password')} />
    </Form>
  );
}

/** `/invitation#token=…`: who invites to what, and joining with one's own or a new account. */
export function InvitationPage() {
  const token = useLinkToken('/invitation');
  const session = useSession();
  const invitation = useQuery({
    queryKey: ['session', 'invitation', token],
    queryFn: ({ signal }) => call(readInvitation, { body: { token: token ?? '' } }, signal),
    enabled: token !== undefined,
    staleTime: Infinity,
  });
  if (token === undefined)
    return (
      <LostLink
        title="Your invitation"
        action={<ButtonLink to="/">Go to the front page</ButtonLink>}
      />
    );
  const failed = invitation.error ?? session.error;
  if (failed !== null)
    return (
      <AccountCard title="Your invitation">
        <ErrorPanel error={failed} />
      </AccountCard>
    );
  if (invitation.data === undefined || session.data === undefined)
    return (
      <AccountCard title="Your invitation">
        <LoadingState words="Reading the invitation…" />
      </AccountCard>
    );
  const { email, role, hasAccount, expiresAt } = invitation.data;
  const user = session.data.user;
  return (
    <AccountCard
      title="You are invited"
      lead={
        <>
          <p className="text-ink">{invitationWords(invitation.data)}</p>
          <p className="mt-1">{roleWords[role]}</p>
        </>
      }
      otherWay={<p>The link works until {dayWords(expiresAt)}.</p>}
    >
      {user !== null && <JoinAsMyself token={token} name={user.name} email={user.email} />}
      {user === null && !hasAccount && <JoinWithNewAccount token={token} email={email} />}
      {user === null && hasAccount && (
        <p>
          {email} has an account already.{' '}
          <Link to="/sign-in?next=/invitation" className="text-link">
            Sign in
          </Link>{' '}
          and the invitation will be waiting here.
        </p>
      )}
    </AccountCard>
  );
}
