import type { ReactNode } from 'react';

export interface PageTitleProps {
  /** First, light part of the heading. */
  children: ReactNode;
  /** What the browser calls the page; the name of the application is added. */
  documentTitle: string;
  /** A line of plain words under the heading. */
  lead?: ReactNode;
  actions?: ReactNode;
}

/** The one h1 of a page, with its actions at the far end. */
export function PageTitle({ children, documentTitle, lead, actions }: PageTitleProps) {
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
      <title>{`${documentTitle} · Overwinter`}</title>
      <div className="max-w-3xl min-w-0">
        <h1 className="text-title font-light tracking-[-0.01em]">{children}</h1>
        {lead !== undefined && <p className="mt-1 text-muted">{lead}</p>}
      </div>
      {actions !== undefined && <div className="flex flex-wrap gap-3">{actions}</div>}
    </div>
  );
}
