import type { ComponentType } from 'react';
import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { FrontPage } from '../routes/front/front-page.tsx';
import { FrameError, NotFoundPage, RouteError } from './route-error.tsx';
import { Shell } from './shell.tsx';

/** One page at one address, in a script of its own. */
function page(path: string, load: () => Promise<ComponentType>): RouteObject {
  return { path, lazy: async () => ({ Component: await load() }) };
}

/** Pages for visitors that carry a form. */
const accountPages: RouteObject[] = [
  page('sign-in', async () => (await import('../routes/account/sign-in.tsx')).SignInPage),
  page('register', async () => (await import('../routes/account/register.tsx')).RegisterPage),
  page('confirm', async () => (await import('../routes/account/confirm.tsx')).ConfirmPage),
  page(
    'forgot-password',
    async () => (await import('../routes/account/forgot-password.tsx')).ForgotPasswordPage,
  ),
  page(
    'reset-password',
    async () => (await import('../routes/account/reset-password.tsx')).ResetPasswordPage,
  ),
  page(
    'confirm-address',
    async () => (await import('../routes/account/confirm-address.tsx')).ConfirmAddressPage,
  ),
  page('invitation', async () => (await import('../routes/account/invitation.tsx')).InvitationPage),
];

/** Pages that need somebody signed in. */
const signedInPages: RouteObject[] = [
  page('account', async () => (await import('../routes/account/account.tsx')).AccountPage),
  page('my/checks', async () => (await import('../routes/my/my-checks.tsx')).MyChecksPage),
  page('projects', async () => (await import('../routes/project/projects.tsx')).ProjectsPage),
  page(
    'projects/:projectId',
    async () => (await import('../routes/project/project.tsx')).ProjectPage,
  ),
  page('studio', async () => (await import('../routes/studio/studios.tsx')).StudiosPage),
  page('studio/:slug', async () => (await import('../routes/studio/studio.tsx')).StudioPage),
  page(
    'found-studio',
    async () => (await import('../routes/studio/found-studio.tsx')).FoundStudioPage,
  ),
  page('reports/:reportId', async () => (await import('../check/report-page.tsx')).ReportPage),
];

/** Pages for everybody. */
const openPages: RouteObject[] = [
  page('check', async () => (await import('../check/check-page.tsx')).CheckPage),
  page(
    'shared-report',
    async () => (await import('../check/shared-report-page.tsx')).SharedReportPage,
  ),
  page('rules/:slug', async () => (await import('../routes/rules/rules.tsx')).RulesPage),
  page('rules/:slug/:edition', async () => (await import('../routes/rules/rules.tsx')).RulesPage),
  page('design', async () => (await import('../routes/design/design.tsx')).DesignPage),
];

/**
 * Every address there is. Only the front page is in the first script; the others bring their
 * own, and what they share (zod, forms, dialogs, toasts) comes with them.
 */
export const routes: RouteObject[] = [
  {
    element: <Shell />,
    errorElement: <FrameError />,
    // The first page may be a lazy one: until its script is there, the frame stays empty.
    hydrateFallbackElement: <></>,
    children: [
      {
        errorElement: <RouteError />,
        children: [
          { index: true, element: <FrontPage /> },
          {
            lazy: async () => ({ Component: (await import('./work-layout.tsx')).WorkLayout }),
            children: [
              {
                errorElement: <RouteError />,
                children: [
                  ...accountPages,
                  ...openPages,
                  {
                    lazy: async () => ({
                      Component: (await import('./require-session.tsx')).RequireSession,
                    }),
                    children: [{ errorElement: <RouteError />, children: signedInPages }],
                  },
                ],
              },
            ],
          },
          { path: '*', element: <NotFoundPage /> },
        ],
      },
    ],
  },
];

export function createRouter() {
  return createBrowserRouter(routes);
}
