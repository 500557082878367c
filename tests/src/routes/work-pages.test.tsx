import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { createQueryClient } from '../../../src/app/query-client.ts';
import { RequireSession } from '../../../src/app/require-session.tsx';
import { RouteError } from '../../../src/app/route-error.tsx';
import { MyChecksPage } from '../../../src/routes/my/my-checks.tsx';
import { ProjectPage } from '../../../src/routes/project/project.tsx';
import { StudioPage } from '../../../src/routes/studio/studio.tsx';
import { answerApi, problem } from '../../support/answer-api.ts';
import {
  exampleId,
  firstReport,
  marenSession,
  onePage,
  weatherForTwo,
} from '../../support/session-examples.ts';

const asMaren = { 'GET /api/session': { body: marenSession } };
const studioPath = '/studio/harbour-lane-mixing';
const studio = {
  id: exampleId(3),
  slug: 'harbour-lane-mixing',
  name: 'Harbour Lane Mixing',
  role: 'owner',
  createdAt: '2026-11-02T09:00:00.000Z',
};
const tobi = {
  userId: exampleId(8),
  name: 'Tobi Adler',
  email: 'tobi@harbour-lane.example',
  role: 'assistant',
  joinedAt: '2026-11-03T09:00:00.000Z',
};

/** The page as the router holds it: behind RequireSession, with the boundary around it. */
function openPage(at: string, path: string, element: React.ReactElement) {
  const router = createMemoryRouter(
    [
      {
        errorElement: <RouteError />,
        children: [
          {
            element: <RequireSession />,
            children: [{ errorElement: <RouteError />, children: [{ path, element }] }],
          },
          { path: '*', element: <p>somewhere else</p> },
        ],
      },
    ],
    { initialEntries: [at] },
  );
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return () => router.state.location.pathname + router.state.location.search;
}

describe('pages that need somebody signed in', () => {
  it('send a visitor to sign in and remember the way', async () => {
    answerApi({ 'GET /api/session': { body: { user: null, studios: [] } } });
    const path = openPage('/my/checks?x=1', '/my/checks', <MyChecksPage />);
    await screen.findByText('somewhere else');
    expect(path()).toBe('/sign-in?next=%2Fmy%2Fchecks%3Fx%3D1');
  });

  it('do the same when the session ends while they are open', async () => {
    answerApi({
      ...asMaren,
      [`GET /api/projects/${exampleId(2)}/songs`]: problem(401, 'sign-in-required'),
    });
    const path = openPage('/my/checks', '/my/checks', <MyChecksPage />);
    await screen.findByText('somewhere else');
    expect(path()).toBe('/sign-in?next=%2Fmy%2Fchecks');
  });

  it('say so when the server is not ready, and try again when asked', async () => {
    let ready = false;
    answerApi({
      'GET /api/session': () => (ready ? { body: marenSession } : problem(500, 'server-error')),
      [`GET /api/projects/${exampleId(2)}/songs`]: { body: onePage([]) },
    });
    openPage('/my/checks', '/my/checks', <MyChecksPage />);
    expect(await screen.findByRole('alert')).toHaveTextContent('request-7');
    ready = true;
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByText('No song checked yet.')).toBeInTheDocument();
  });
});

describe('the studio', () => {
  it('shows projects, editions and people to its owner', async () => {
    answerApi({
      ...asMaren,
      'GET /api/studios/harbour-lane-mixing': { body: studio },
      'GET /api/projects': { body: onePage([weatherForTwo]) },
      'GET /api/rules/harbour-lane-mixing/editions': {
        body: onePage([
          {
            number: 1,
            publishedAt: '2026-11-03T10:00:00.000Z',
            changeSummary: '',
            rulesHash: 'a'.repeat(64),
          },
        ]),
      },
      [`GET /api/studios/${studio.id}/members`]: { body: onePage([tobi]) },
      [`GET /api/studios/${studio.id}/invitations`]: { body: onePage([]) },
    });
    openPage(studioPath, '/studio/:slug', <StudioPage />);
    expect(await screen.findByRole('link', { name: 'Weather for Two' })).toBeInTheDocument();
    expect(await screen.findByRole('link', { name: 'Edition 1' })).toHaveAttribute(
      'href',
      '/rules/harbour-lane-mixing/1',
    );
    expect(await screen.findByText('Tobi Adler')).toBeInTheDocument();
  });

  it('asks before it takes somebody off', async () => {
    const requests = answerApi({
      ...asMaren,
      'GET /api/studios/harbour-lane-mixing': { body: studio },
      [`GET /api/studios/${studio.id}/members`]: { body: onePage([tobi]) },
      [`GET /api/studios/${studio.id}/invitations`]: { body: onePage([]) },
      [`DELETE /api/studios/${studio.id}/members/${tobi.userId}`]: {},
    });
    openPage(studioPath, '/studio/:slug', <StudioPage />);
    await userEvent.click(await screen.findByRole('button', { name: 'Take off Tobi Adler' }));
    const dialog = screen.getByRole('alertdialog', { name: 'Take off Tobi Adler?' });
    expect(requests.some(({ method }) => method === 'DELETE')).toBe(false);
    await userEvent.click(within(dialog).getByRole('button', { name: 'Take them off' }));
    await waitFor(() => {
      expect(requests.some(({ method }) => method === 'DELETE')).toBe(true);
    });
  });

  it('shows an assistant neither people nor the opening of projects', async () => {
    const requests = answerApi({
      ...asMaren,
      'GET /api/studios/harbour-lane-mixing': { body: { ...studio, role: 'assistant' } },
      'GET /api/projects': { body: onePage([]) },
    });
    openPage(studioPath, '/studio/:slug', <StudioPage />);
    expect(await screen.findByText('No projects yet.')).toBeInTheDocument();
    expect(screen.queryByRole('button', { name: 'Open a project' })).toBeNull();
    expect(requests.some(({ path }) => path.endsWith('/members'))).toBe(false);
  });

  it('is not found where nobody may know of it', async () => {
    // React reports what a boundary catches.
    vi.spyOn(console, 'error').mockImplementation(() => undefined);
    answerApi(asMaren);
    openPage('/studio/unknown', '/studio/:slug', <StudioPage />);
    expect(await screen.findByRole('heading', { name: 'This case is empty.' })).toBeInTheDocument();
    vi.restoreAllMocks();
  });
});

describe('the project', () => {
  const projectPath = `/projects/${weatherForTwo.id}`;
  const song = {
    id: exampleId(50),
    projectId: weatherForTwo.id,
    title: 'Salt on the Windows',
    createdAt: '2026-11-20T10:12:00.000Z',
  };
  const answers = {
    ...asMaren,
    [`GET /api${projectPath}`]: { body: weatherForTwo },
    [`GET /api${projectPath}/songs`]: { body: onePage([song]) },
    [`GET /api${projectPath}/members`]: { body: onePage([]) },
    [`GET /api${projectPath}/invitations`]: { body: onePage([]) },
    [`GET /api/studios/${studio.id}/members?limit=100`]: { body: onePage([tobi]) },
    [`GET /api/songs/${song.id}/reports?limit=100`]: { body: onePage([firstReport]) },
  };

  it('shows each song with its reports and says where the server disagrees', async () => {
    answerApi(answers);
    openPage(projectPath, '/projects/:projectId', <ProjectPage />);
    expect(await screen.findByText('2 must fix, 4 look, 1 note')).toBeInTheDocument();
    expect(screen.getByText(/the server judges some findings differently/)).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'house rules, edition 1' })).toHaveAttribute(
      'href',
      '/rules/harbour-lane-mixing/1',
    );
  });

  it('adds a song and reads the list again', async () => {
    const requests = answerApi({ ...answers, [`POST /api${projectPath}/songs`]: { body: song } });
    openPage(projectPath, '/projects/:projectId', <ProjectPage />);
    const user = userEvent.setup();
    await user.type(await screen.findByLabelText('Add a song'), 'Paper Ferry');
    await user.click(screen.getByRole('button', { name: 'Add it' }));
    await waitFor(() => {
      expect(screen.getByLabelText('Add a song')).toHaveValue('');
    });
    const listed = requests.filter(
      ({ method, path }) => method === 'GET' && path.endsWith('/songs'),
    );
    expect(listed).toHaveLength(2);
  });

  it('invites in the chosen role', async () => {
    const requests = answerApi({
      ...answers,
      [`POST /api${projectPath}/invitations`]: {
        body: {
          id: exampleId(60),
          email: 'sol@velvet-tramline.example',
          role: 'bandmate',
          createdAt: '2026-12-01T10:00:00.000Z',
          expiresAt: '2026-12-08T10:00:00.000Z',
        },
      },
    });
    openPage(projectPath, '/projects/:projectId', <ProjectPage />);
    const user = userEvent.setup();
    await user.type(
      await screen.findByLabelText('Invite the artist or a bandmate'),
      'sol@velvet-tramline.example',
    );
    await user.click(screen.getByRole('radio', { name: /Bandmate/ }));
    await user.click(screen.getByRole('button', { name: 'Send the invitation' }));
    await waitFor(() => {
      expect(requests.find(({ method }) => method === 'POST')?.body).toEqual({
        email: 'sol@velvet-tramline.example',
        role: 'bandmate',
      });
    });
  });
});
