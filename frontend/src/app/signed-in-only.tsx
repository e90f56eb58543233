import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { ErrorState, Loading } from '#frontend/components/states.tsx';
import { useHasLeft, useSessionQuery } from '#frontend/features/session/api/session.ts';

/** Sends everyone else to the sign-in, which leads back here. */
export function SignedInOnly() {
  const session = useSessionQuery();
  const hasLeft = useHasLeft();
  const { pathname, search, hash } = useLocation();
  if (session.isPending) {
    return (
      <div className="page pt-10">
        <Loading what="Opening your workspace" />
      </div>
    );
  }
  if (session.isError) {
    return (
      <div className="page pt-10">
        <ErrorState
          title="Your session could not be read."
          error={session.error}
          onRetry={() => void session.refetch()}
        />
      </div>
    );
  }
  if (!session.data.user || !session.data.workspace) {
    const next = pathname + search + hash;
    return (
      <Navigate
        to={hasLeft || next === '/projects' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(next)}`}
        replace
      />
    );
  }
  return <Outlet />;
}
