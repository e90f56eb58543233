import { ButtonLink } from '#frontend/components/button.tsx';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { SnowLine } from '#frontend/components/snow-line.tsx';

export function NotFoundPage() {
  return (
    <>
      <div className="page pt-14">
        <PageTitle
          documentTitle="Not found"
          lead="It may have been removed, it may belong to another workspace, or the address has a slip in it."
        >
          There is <strong className="font-extrabold">nothing at this address</strong>
        </PageTitle>
        <ButtonLink to="/projects" variant="primary" className="mt-8">
          Go to the projects
        </ButtonLink>
      </div>
      <SnowLine className="mt-16" />
    </>
  );
}
