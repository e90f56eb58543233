import { useNavigate } from 'react-router-dom';
import { Menu, type MenuItem } from '#frontend/components/menu.tsx';
import { useToast } from '#frontend/components/toast.tsx';
import { useSelectWorkspace, useSignOut } from '#frontend/features/session/api/session.ts';
import type { SignedIn } from '#frontend/features/session/hooks/use-session.ts';
import { useTheme } from '#frontend/hooks/use-theme.ts';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { THEMES } from '#frontend/lib/theme.ts';

const THEME_LABELS = { system: 'Light or dark as the system', light: 'Light', dark: 'Dark' };

/** Workspace name in the head; behind it the account, the workspaces, the theme and the way out. */
export function AccountMenu({ session }: { session: SignedIn }) {
  const navigate = useNavigate();
  const toast = useToast();
  const signOut = useSignOut();
  const selectWorkspace = useSelectWorkspace();
  const [theme, setTheme] = useTheme();
  const onError = (error: unknown) => toast({ text: wordsOfError(error), isError: true });

  const others: MenuItem[] =
    session.workspaces.length < 2
      ? []
      : session.workspaces.map((workspace, index) => ({
          key: workspace.id,
          label: workspace.name,
          isChecked: workspace.id === session.workspace.id,
          startsGroup: index === 0,
          onSelect: () =>
            selectWorkspace.mutate(workspace.id, { onSuccess: () => void navigate('/projects'), onError }),
        }));
  const items: MenuItem[] = [
    { key: 'account', label: 'Account', onSelect: () => void navigate('/account') },
    ...others,
    ...THEMES.map((choice, index) => ({
      key: choice,
      label: THEME_LABELS[choice],
      isChecked: choice === theme,
      startsGroup: index === 0,
      onSelect: () => setTheme(choice),
    })),
    {
      key: 'sign-out',
      label: 'Sign out',
      startsGroup: true,
      onSelect: () => signOut.mutate(undefined, { onSuccess: () => void navigate('/sign-in'), onError }),
    },
  ];
  return (
    <Menu
      label="Account"
      isButtonNamed
      items={items}
      buttonClassName="flex min-h-9 items-center gap-2 text-ink hover:underline underline-offset-4"
      button={
        <>
          <span className="sr-only">Account of {session.user.name},</span>
          <span className="text-right max-sm:sr-only">
            <span className="block max-w-44 truncate">{session.workspace.name}</span>
            {session.workspace.isDemo && <span className="block text-xs text-muted">demo, all figures invented</span>}
          </span>
          <span
            aria-hidden="true"
            className="inline-flex size-8 items-center justify-center rounded-full bg-accent-soft text-small font-semibold"
          >
            {initials(session.user.name)}
          </span>
        </>
      }
      heading={
        <p className="px-4 pt-1 pb-3 text-small text-muted">
          <span className="block text-base font-semibold text-ink">{session.user.name}</span>
          {session.workspace.name}, {session.role}
        </p>
      }
    />
  );
}

function initials(name: string): string {
  const words = name.split(/\s+/).filter(Boolean);
  return ((words[0]?.[0] ?? '') + (words.length > 1 ? (words.at(-1)?.[0] ?? '') : '')).toUpperCase();
}
