import { useState } from 'react';
import { Link, NavLink, Outlet, ScrollRestoration, useNavigation } from 'react-router-dom';
import { FrameSlotsContext } from '#frontend/components/frame-slots.tsx';
import { Mark } from '#frontend/components/mark.tsx';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { AccountMenu } from './account-menu.tsx';
import { DemoNotice } from './demo-notice.tsx';
import { OfflineNotice } from './offline-notice.tsx';

const LINKS = [
  { to: '/projects', label: 'Projects' },
  { to: '/library', label: 'Library' },
];

/** Head, page and notices; what stands in the head besides comes from the page through the slots. */
export function AppFrame() {
  const session = useSession();
  const navigation = useNavigation();
  const [breadcrumb, setBreadcrumb] = useState<HTMLElement | null>(null);
  const [status, setStatus] = useState<HTMLElement | null>(null);
  return (
    <FrameSlotsContext value={{ breadcrumb, status }}>
      <a
        href="#main"
        className="fixed top-2 left-2 z-50 -translate-y-20 bg-accent px-4 py-2 text-on-accent focus:translate-y-0"
      >
        Skip to the page
      </a>
      <header className="no-print">
        <div className="page flex min-h-16 flex-wrap items-center gap-x-6 gap-y-1 py-2">
          <Link to="/projects" className="flex items-center gap-3 text-ink">
            <Mark className="size-8 text-accent" />
            <span className="font-extrabold">Overwinter</span>
          </Link>
          <div ref={setBreadcrumb} className="order-4 min-w-0 basis-full md:order-none md:flex-1 md:basis-0" />
          <div ref={setStatus} className="order-5 flex items-center gap-4 text-muted md:order-none" />
          {session && (
            <nav aria-label="Main" className="max-md:ml-auto">
              <ul className="flex items-center gap-5">
                {LINKS.map((link) => (
                  <li key={link.to}>
                    <NavLink
                      to={link.to}
                      className={({ isActive }) => (isActive ? 'font-semibold text-ink' : 'text-muted hover:text-ink')}
                    >
                      {link.label}
                    </NavLink>
                  </li>
                ))}
                <li>
                  <AccountMenu session={session} />
                </li>
              </ul>
            </nav>
          )}
        </div>
        {/* A page on its way: a line that grows, in a slot that is always there. */}
        <div aria-hidden="true" className="h-px bg-hair">
          {navigation.state === 'loading' && <div className="h-px w-1/3 animate-pulse bg-accent" />}
        </div>
        <OfflineNotice />
      </header>
      <main id="main" tabIndex={-1} className="min-h-[calc(100dvh-9rem)] pb-20">
        <Outlet />
      </main>
      {session?.workspace.isDemo === true && <DemoNotice />}
      <ScrollRestoration />
    </FrameSlotsContext>
  );
}
