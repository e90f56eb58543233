import { useQueryClient } from '@tanstack/react-query';
import type { Role } from '#common/schemas/api/common.ts';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { Segmented } from '#frontend/components/segmented.tsx';
import { ChangePasswordForm } from '#frontend/features/account/components/change-password-form.tsx';
import { keepSession } from '#frontend/features/session/api/session.ts';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { useTheme } from '#frontend/hooks/use-theme.ts';

const ROLE_WORDS: Record<Role, string> = {
  owner: 'owner: members and everything else',
  engineer: 'engineer: edits all technical data',
  sales: 'sales: reads, compares, shares and reports',
  viewer: 'viewer: reads',
};

const THEME_OPTIONS = [
  { value: 'system', label: 'As the system' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const;

export function AccountPage() {
  const session = useSession();
  const client = useQueryClient();
  const [theme, setTheme] = useTheme();
  if (!session) return null;
  const facts = [
    { term: 'Name', text: session.user.name },
    { term: 'E-mail', text: session.user.email },
    { term: 'Workspace', text: session.workspace.name },
    { term: 'Role', text: ROLE_WORDS[session.role] },
  ];
  return (
    <div className="page pt-10">
      <PageTitle documentTitle="Account">
        Account of <strong className="font-extrabold">{session.user.name}</strong>
      </PageTitle>
      <div className="mt-10 grid gap-x-20 gap-y-12 lg:grid-cols-2">
        <div className="space-y-12">
          <dl className="max-w-xl">
            {facts.map(({ term, text }) => (
              <div key={term} className="flex flex-wrap justify-between gap-x-6 border-b border-hair py-2.5">
                <dt className="text-muted">{term}</dt>
                <dd className="min-w-0 text-right font-semibold">{text}</dd>
              </div>
            ))}
          </dl>
          <section>
            <h2 className="text-lead font-light">Light or dark</h2>
            <div className="mt-2">
              <Segmented label="Light or dark" value={theme} options={THEME_OPTIONS} onChange={setTheme} />
            </div>
            <p className="mt-1 text-small text-muted">Kept in this browser.</p>
          </section>
        </div>
        <section>
          <h2 className="text-lead font-light">Change the password</h2>
          <p className="mt-1 mb-6 max-w-sm text-muted">With the change, this account is signed out everywhere else.</p>
          <ChangePasswordForm email={session.user.email} onRenewed={(renewed) => keepSession(client, renewed)} />
        </section>
      </div>
    </div>
  );
}
