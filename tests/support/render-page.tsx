import { QueryClientProvider, type QueryClient } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactElement } from 'react';
import { createMemoryRouter, RouterProvider, type RouteObject } from 'react-router-dom';
import { createQueryClient } from '../../src/app/query-client.ts';

type RenderedPage = { client: QueryClient; path: () => string };

/** A page at its address, with other addresses to go to; the API is answered by answerApi(). */
export function renderPage(
  element: ReactElement,
  {
    at = '/',
    path = '*',
    others = [],
  }: { at?: string; path?: string; others?: RouteObject[] } = {},
): RenderedPage {
  const client = createQueryClient();
  client.setDefaultOptions({ queries: { ...client.getDefaultOptions().queries, retry: false } });
  const router = createMemoryRouter([{ path, element }, ...others], { initialEntries: [at] });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return {
    client,
    path: () => router.state.location.pathname + router.state.location.search,
  };
}
