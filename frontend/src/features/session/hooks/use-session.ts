import type { Role } from '#common/schemas/api/common.ts';
import type { Session } from '#common/schemas/api/session.ts';
import { useSessionQuery } from '../api/session.ts';

export interface SignedIn {
  user: NonNullable<Session['user']>;
  workspace: NonNullable<Session['workspace']>;
  workspaces: Session['workspaces'];
  role: Role;
  /** Owners and engineers change technical data; the others read. */
  canEdit: boolean;
}

/** Who is signed in, or null. */
export function useSession(): SignedIn | null {
  const { data } = useSessionQuery();
  if (!data?.user || !data.workspace) return null;
  const { role } = data.workspace;
  return {
    user: data.user,
    workspace: data.workspace,
    workspaces: data.workspaces,
    role,
    canEdit: role === 'owner' || role === 'engineer',
  };
}
