import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { takeLinkTokens } from '../../../src/app/link-token.ts';
import { ConfirmPage } from '../../../src/routes/account/confirm.tsx';
import { InvitationPage } from '../../../src/routes/account/invitation.tsx';
import { RegisterPage } from '../../../src/routes/account/register.tsx';
import { SignInPage } from '../../../src/routes/account/sign-in.tsx';
import { answerApi, problem } from '../../support/answer-api.ts';
import { renderPage } from '../../support/render-page.tsx';
import { marenSession } from '../../support/session-examples.ts';

const visitor = { body: { user: null, studios: [] } };
const anywhere = [{ path: '*', element: <p>somewhere else</p> }];
const token = 'A'.repeat(43);

function openLink(path: string): void {
  window.history.replaceState(null, '', `${path}#token=${token}`);
  takeLinkTokens();
}

async function signInWith(email: string, password: string) {
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('E-mail address'), email);
  await user.type(screen.getByLabelText('Password'), password);
  await user.click(screen.getByRole('button', { name: 'Sign in' }));
}

describe('signing in', () => {
  it('says beside each field what is missing and goes to the first one', async () => {
    const requests = answerApi({ 'GET /api/session': visitor });
    renderPage(<SignInPage />);
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    await waitFor(() => {
      expect(screen.getByLabelText('E-mail address')).toHaveFocus();
    });
    expect(screen.getByLabelText('E-mail address')).toHaveAccessibleDescription(
      /whole e-mail address/,
    );
    expect(screen.getByLabelText('Password')).toHaveAccessibleDescription('Write your password.');
    expect(requests.filter(({ method }) => method === 'POST')).toEqual([]);
  });

  it('says when address and password do not fit, and keeps what was typed', async () => {
    answerApi({ 'GET /api/session': visitor, 'POST /api/session': problem(401, 'sign-in-failed') });
    renderPage(<SignInPage />);
    await signInWith('maren@harbour-lane.example', 'not her password');
    expect(await screen.findByRole('alert')).toHaveTextContent('do not fit together');
    expect(screen.getByLabelText('E-mail address')).toHaveValue('maren@harbour-lane.example');
  });

  it('leads to the page the person was on the way to', async () => {
    const requests = answerApi({
      'GET /api/session': visitor,
      'POST /api/session': { body: marenSession },
    });
    const { path } = renderPage(<SignInPage />, {
      at: '/sign-in?next=%2Fprojects%2F7',
      path: '/sign-in',
      others: anywhere,
    });
    await signInWith('  Maren@Harbour-Lane.example ', 'slow fader, warm room');
    await screen.findByText('somewhere else');
    expect(path()).toBe('/projects/7');
    expect(requests.at(-1)?.body).toEqual({
      email: 'maren@harbour-lane.example',
      password: 'slow fader, warm room',
    });
  });

  it('leads home, and never to another site', async () => {
    answerApi({ 'GET /api/session': visitor, 'POST /api/session': { body: marenSession } });
    const { path } = renderPage(<SignInPage />, {
      at: '/sign-in?next=%2F%2Fevil.example',
      path: '/sign-in',
      others: anywhere,
    });
    await signInWith('maren@harbour-lane.example', 'slow fader, warm room');
    await screen.findByText('somewhere else');
    expect(path()).toBe('/studio/harbour-lane-mixing');
  });

  it('is passed by for somebody who is signed in', async () => {
    answerApi({ 'GET /api/session': { body: marenSession } });
    const { path } = renderPage(<SignInPage />, {
      at: '/sign-in',
      path: '/sign-in',
      others: anywhere,
    });
    await screen.findByText('somewhere else');
    expect(path()).toBe('/studio/harbour-lane-mixing');
  });
});

describe('registering', () => {
  it('says where the mail went and not whether the address was known', async () => {
    answerApi({ 'POST /api/accounts': {} });
    renderPage(<RegisterPage />);
    const user = userEvent.setup();
    await user.type(screen.getByLabelText('Your name'), 'Juno Park');
    await user.type(screen.getByLabelText('E-mail address'), 'juno@velvet-tramline.example');
    await user.click(screen.getByRole('button', { name: 'Send me the link' }));
    expect(await screen.findByRole('status')).toHaveTextContent('juno@velvet-tramline.example');
    await user.click(screen.getByRole('button', { name: 'Correct the address' }));
    expect(screen.getByLabelText('E-mail address')).toHaveValue('juno@velvet-tramline.example');
  });

  it('says how long to wait after too many tries', async () => {
    answerApi({
      'POST /api/accounts': problem(429, 'too-many-tries', { retryAfterSeconds: 1200 }),
    });
    renderPage(<RegisterPage />);
    const user = userEvent.setup();
    await user.type(screen.getByLabelText('Your name'), 'Juno Park');
    await user.type(screen.getByLabelText('E-mail address'), 'juno@velvet-tramline.example');
    await user.click(screen.getByRole('button', { name: 'Send me the link' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('Try again in 20 minutes.');
  });
});

describe('confirming an address', () => {
  it('asks for the mail again where the secret is gone', () => {
    renderPage(<ConfirmPage />);
    expect(screen.getByText(/open the link from the mail again/)).toBeInTheDocument();
  });

  it('takes a password and the secret of the link, and signs in', async () => {
    openLink('/confirm');
    const requests = answerApi({ 'POST /api/accounts/confirm': { body: marenSession } });
    const { path } = renderPage(<ConfirmPage />, {
      at: '/confirm',
      path: '/confirm',
      others: anywhere,
    });
    const user = userEvent.setup();
    await user.type(screen.getByLabelText('Password'), 'short');
    await user.click(screen.getByRole('button', { name: 'Make the account' }));
    await waitFor(() => {
      expect(screen.getByLabelText('Password')).toHaveAccessibleDescription(
        /Use 12 characters or more/,
      );
    });
    await user.clear(screen.getByLabelText('Password'));
    await user.type(screen.getByLabelText('Password'), 'aaaaaaaaaaaa');
    await waitFor(() => {
      expect(screen.getByLabelText('Password')).toHaveAccessibleDescription(
        /five different characters/,
      );
    });
    await user.type(screen.getByLabelText('Password'), ' slow fader');
    await user.click(screen.getByRole('button', { name: 'Make the account' }));
    await screen.findByText('somewhere else');
    expect(path()).toBe('/studio/harbour-lane-mixing');
    expect(requests.at(-1)?.body).toEqual({ token, password: 'aaaaaaaaaaaa slow fader' });
  });
});

const invitation = {
  role: 'artist',
  invitedBy: 'Maren Holt',
  email: 'juno@velvet-tramline.example',
  hasAccount: false,
  studioName: 'Harbour Lane Mixing',
  projectTitle: 'Weather for Two',
  expiresAt: '2026-12-08T10:00:00.000Z',
};

describe('an invitation', () => {
  beforeEach(() => {
    openLink('/invitation');
  });

  it('is accepted by a visitor with a new account', async () => {
    const requests = answerApi({
      'GET /api/session': visitor,
      'POST /api/invitations/read': { body: invitation },
      'POST /api/invitations/accept': {
        body: {
          session: { ...marenSession, studios: [] },
          studioSlug: null,
          projectId: marenSession.user?.privateProjectId,
        },
      },
    });
    const { path } = renderPage(<InvitationPage />, {
      at: '/invitation',
      path: '/invitation',
      others: anywhere,
    });
    expect(
      await screen.findByText(
        'Maren Holt invites you to “Weather for Two” at Harbour Lane Mixing, as the artist.',
      ),
    ).toBeInTheDocument();
    const user = userEvent.setup();
    await user.type(screen.getByLabelText('Your name'), 'Juno Park');
    await user.type(screen.getByLabelText('Password'), 'salt on every window');
    await user.click(screen.getByRole('button', { name: 'Accept the invitation' }));
    await screen.findByText('somewhere else');
    expect(path()).toBe(`/projects/${marenSession.user?.privateProjectId ?? ''}`);
    expect(requests.at(-1)?.body).toEqual({
      token,
      newAccount: { name: 'Juno Park', password: 'salt on every window' },
    });
  });

  it('asks somebody with an account to sign in first', async () => {
    answerApi({
      'GET /api/session': visitor,
      'POST /api/invitations/read': { body: { ...invitation, hasAccount: true } },
    });
    renderPage(<InvitationPage />);
    expect(await screen.findByRole('link', { name: 'Sign in' })).toHaveAttribute(
      'href',
      '/sign-in?next=/invitation',
    );
  });

  it('joins the account of somebody who is signed in', async () => {
    const requests = answerApi({
      'GET /api/session': { body: marenSession },
      'POST /api/invitations/read': {
        body: { ...invitation, role: 'assistant', projectTitle: null },
      },
      'POST /api/invitations/accept': {
        body: { session: marenSession, studioSlug: 'harbour-lane-mixing', projectId: null },
      },
    });
    const { path } = renderPage(<InvitationPage />, {
      at: '/invitation',
      path: '/invitation',
      others: anywhere,
    });
    await userEvent.click(await screen.findByRole('button', { name: 'Accept the invitation' }));
    await screen.findByText('somewhere else');
    expect(path()).toBe('/studio/harbour-lane-mixing');
    expect(requests.at(-1)?.body).toEqual({ token });
  });

  it('says when the link is too old', async () => {
    answerApi({
      'GET /api/session': visitor,
      'POST /api/invitations/read': problem(410, 'link-expired'),
    });
    renderPage(<InvitationPage />);
    expect(await screen.findByRole('alert')).toHaveTextContent('This link no longer works.');
  });
});
