import { useLocation, useNavigate } from 'react-router-dom';
import { ButtonLink } from '#frontend/components/button.tsx';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { SetupForm } from '#frontend/features/session/components/setup-form.tsx';

export function SetupPage() {
  const navigate = useNavigate();
  // In the fragment, which the browser sends to no server.
  const token = new URLSearchParams(useLocation().hash.slice(1)).get('token');
  return (
    <div className="page pt-14 md:pt-24">
      <PageTitle
        documentTitle="First owner"
        lead={
          token === null
            ? 'Open the link that the server printed when it started: it carries the token that this page needs.'
            : 'This makes the first workspace. You become its owner and invite others later.'
        }
      >
        The <strong className="font-extrabold">first owner</strong>
      </PageTitle>
      <div className="mt-8">
        {token === null ? (
          <ButtonLink to="/sign-in">Go to the sign-in</ButtonLink>
        ) : (
          <SetupForm token={token} onDone={() => void navigate('/projects', { replace: true })} />
        )}
      </div>
    </div>
  );
}
