import { NavLink } from 'react-router-dom';

export interface Tab {
  to: string;
  label: string;
  /** Only the exact address selects this tab. */
  end?: boolean;
}

/** Tabs that are addresses: a line of links, the current one in bold on a rule. */
export function Tabs({ label, tabs }: { label: string; tabs: readonly Tab[] }) {
  return (
    <nav aria-label={label} className="border-b border-hair">
      <ul className="-mb-px flex gap-5 overflow-x-auto sm:gap-6">
        {tabs.map((tab) => (
          <li key={tab.to}>
            <NavLink
              to={tab.to}
              end={tab.end ?? false}
              className={({ isActive }) =>
                `block border-b-2 px-px py-2.5 whitespace-nowrap focus-visible:outline-offset-[-2px] ${isActive ? 'border-accent font-extrabold' : 'border-transparent text-muted hover:text-ink'}`
              }
            >
              {tab.label}
            </NavLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}
