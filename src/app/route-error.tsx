import { AppError } from '#shared/errors.ts';
import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button, ButtonLink } from '../ui/button.tsx';
import { errorText, requestIdOf } from './error-text.ts';
import { usePageTitle } from './page-title.ts';
import { Frame, Page } from './shell.tsx';

/** The page at an address where nothing is. */
export function NotFoundPage() {
  usePageTitle('Not found');
  return (
    <Page narrow>
      <p className="figures text-small text-ink-2">404</p>
      <h1 className="mt-1 text-title">This case is empty.</h1>
      <p className="mt-3 text-ink-2">
        There is no page at this address. It may have been mistyped, or what was here is gone.
      </p>
      <div className="mt-6 flex flex-wrap gap-2">
        <ButtonLink to="/" kind="primary">
          Go to the front page
        </ButtonLink>
        <ButtonLink to="/check">Check a folder</ButtonLink>
      </div>
    </Page>
  );
}

/** In place of a page that threw: what happened, in words, and two ways on. */
export function RouteError() {
  const error = useRouteError();
  const { title, advice } = errorText(error);
  const requestId = requestIdOf(error);
  usePageTitle(title);
  const missing =
    (isRouteErrorResponse(error) && error.status === 404) ||
    (error instanceof AppError && error.code === 'not-found');
  if (missing) return <NotFoundPage />;
  return (
    <Page narrow>
      <h1 className="text-title">{title}</h1>
      <p className="mt-3 text-ink-2">{advice}</p>
      {requestId !== undefined && (
        <p className="mt-3 text-small text-ink-2">
          Request <span className="figures wrap-anywhere">{requestId}</span>
        </p>
      )}
      <div className="mt-6 flex flex-wrap gap-2">
        <Button
          kind="primary"
          onClick={() => {
            window.location.reload();
          }}
        >
          Reload this page
        </Button>
        <ButtonLink to="/">Go to the front page</ButtonLink>
      </div>
    </Page>
  );
}

/** The same where the frame itself is not there to hold it. */
export function FrameError() {
  return (
    <Frame>
      <RouteError />
    </Frame>
  );
}
