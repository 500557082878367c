import { signIn } from '#shared/api/accounts.ts';
import { useQueryClient } from '@tanstack/react-query';
import { Link, Navigate, useLocation, useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { emailWords, givenPasswordWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { homePath } from '../../app/home-path.ts';
import { safeNextPath } from '../../app/next-path.ts';
import { replaceSession, useSession } from '../../app/session-query.ts';
import { AccountCard } from './account-card.tsx';
import { CurrentPasswordField, EmailField } from './account-fields.tsx';

/** `/sign-in`, with `?next=` where the person was on their way somewhere. */
export function SignInPage() {
  const client = useQueryClient();
  const navigate = useNavigate();
  const { search } = useLocation();
  const next = safeNextPath(search);
  const session = useSession().data;
  const form = useBodyForm({
    schema: signIn.body,
    defaults: { email: '', password: '' },
    words: { email: emailWords, password: givenPasswordWords },
    submit: async (body) => {
      const signedIn = await call(signIn, { body });
      replaceSession(client, signedIn);
      await navigate(next ?? homePath(signedIn), { replace: true });
    },
  });
  if (session !== undefined && session.user !== null && !form.busy)
    return <Navigate to={next ?? homePath(session)} replace />;
  return (
    <AccountCard
      title="Sign in"
      lead={
        next === undefined
          ? 'To your reports, your projects and your studio. Checking a folder needs no account.'
          : 'Sign in to go on to the page you asked for.'
      }
      otherWay={
        <p>
          New here?{' '}
          <Link to="/register" className="text-link">
            Make an account
          </Link>
          , or{' '}
          <Link to="/check" className="text-link">
            check a folder without one
          </Link>
          .
        </p>
      }
    >
      <Form
        form={form}
        submitWords="Sign in"
        busyWords="Signing in…"
        aside={
          <Link to="/forgot-password" className="text-link inline-block py-1 text-small">
            Forgotten your password?
          </Link>
        }
      >
        <EmailField
          autoComplete="username"
          error={form.mistake('email')}
          registration={form.register('email')}
        />
        <CurrentPasswordField
          error={form.mistake('password')}
          registration={form.register('password')}
        />
      </Form>
    </AccountCard>
  );
}
