import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button, ButtonLink } from '#frontend/components/button.tsx';
import { ErrorState } from '#frontend/components/states.tsx';
import { ApiError } from '#frontend/lib/api-client.ts';
import { NotFoundPage } from './pages/not-found-page.tsx';

/** Shown in place of a page that broke; the rest of the frame stays. */
export function RouteError() {
  const error = useRouteError();
  const isMissing = (isRouteErrorResponse(error) || error instanceof ApiError) && error.status === 404;
  if (isMissing) return <NotFoundPage />;
  const isFetchFailure = error instanceof TypeError && /dynamically imported module|module script/i.test(error.message);
  return (
    <div className="page pt-10">
      <title>Error · Overwinter</title>
      <h1 className="sr-only">Error</h1>
      {isFetchFailure ? (
        <div role="alert" className="max-w-xl border-l-2 border-rust pl-5">
          <p className="text-lead font-light">This page could not be fetched.</p>
          <p className="mt-1 text-muted">
            The server cannot be reached, or the application has been renewed since you opened it. Work that was not
            saved is kept in this browser.
          </p>
        </div>
      ) : (
        <ErrorState title="This page broke." error={error} />
      )}
      <div className="mt-6 flex gap-3">
        <Button variant="primary" onClick={() => window.location.reload()}>
          Reload
        </Button>
        <ButtonLink to="/projects">Go to the projects</ButtonLink>
      </div>
    </div>
  );
}
