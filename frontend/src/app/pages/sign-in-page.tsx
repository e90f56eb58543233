import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { SnowLine } from '#frontend/components/snow-line.tsx';
import { SignInForm } from '#frontend/features/session/components/sign-in-form.tsx';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { ownPath } from '#frontend/lib/own-path.ts';

export function SignInPage() {
  const navigate = useNavigate();
  const session = useSession();
  const [search] = useSearchParams();
  const next = ownPath(search.get('next'));
  if (session) return <Navigate to={next} replace />;
  return (
    <>
      <div className="page grid gap-x-20 gap-y-10 pt-14 md:grid-cols-[minmax(0,24rem)_1fr] md:pt-24">
        <div>
          <PageTitle documentTitle="Sign in">
            Sign <strong className="font-extrabold">in</strong>
          </PageTitle>
          <div className="mt-8">
            <SignInForm onSignedIn={() => void navigate(next, { replace: true })} />
          </div>
        </div>
        <p className="max-w-md self-start text-lead font-light text-muted max-md:order-first md:border-l md:border-hair md:pl-10">
          How long will this node live on this battery, <span className="text-ink">and what will end it?</span>
        </p>
      </div>
      <SnowLine className="mt-20" />
    </>
  );
}
