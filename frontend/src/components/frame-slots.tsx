import { createContext, use, type ReactNode } from 'react';
import { createPortal } from 'react-dom';
import { Link } from 'react-router-dom';

export interface FrameSlots {
  breadcrumb: HTMLElement | null;
  status: HTMLElement | null;
}

/** Places in the head of the page that the page itself fills. The frame provides them. */
export const FrameSlotsContext = createContext<FrameSlots>({ breadcrumb: null, status: null });

export interface Crumb {
  label: string;
  /** Absent for the page itself. */
  to?: string;
}

/** Where this page lies, in the head of the frame. */
export function Breadcrumb({ crumbs }: { crumbs: readonly Crumb[] }) {
  const { breadcrumb } = use(FrameSlotsContext);
  if (!breadcrumb) return null;
  return createPortal(
    <nav aria-label="Where you are" className="min-w-0">
      <ol className="flex min-w-0 items-baseline">
        {crumbs.map((crumb, index) => (
          <li key={crumb.label + String(index)} className="flex min-w-0 shrink last:shrink-2">
            {index > 0 && (
              <span aria-hidden="true" className="px-2 text-muted">
                /
              </span>
            )}
            {crumb.to === undefined ? (
              <span aria-current="page" className="truncate">
                {crumb.label}
              </span>
            ) : (
              <Link
                to={crumb.to}
                className="truncate text-muted hover:text-ink hover:underline hover:underline-offset-4"
              >
                {crumb.label}
              </Link>
            )}
          </li>
        ))}
      </ol>
    </nav>,
    breadcrumb,
  );
}

/** What the page says about itself in the head: "revision 7, saved 14:02", and its own actions. */
export function HeaderStatus({ children }: { children: ReactNode }) {
  const { status } = use(FrameSlotsContext);
  return status ? createPortal(children, status) : null;
}
