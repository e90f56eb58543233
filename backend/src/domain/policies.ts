import type { Role } from '#common/schemas/api/common.ts';
import { ForbiddenError, UnauthenticatedError } from './errors.ts';
import type { Member, Principal } from './principal.ts';

export type PolicyName = 'public' | 'signed-in' | 'read' | 'edit' | 'owner';

/** Who may use a route. `admit` throws for everybody else and hands on what the use case needs to know of the sender. */
export interface Policy<Admitted> {
  readonly name: PolicyName;
  admit(principal: Principal | null): Admitted;
}

/** Roles that each policy of a workspace admits. Sales reads; the knobs it may move belong to shares. */
export const ROLES: Readonly<Record<'read' | 'edit' | 'owner', readonly Role[]>> = {
  read: ['owner', 'engineer', 'sales', 'viewer'],
  edit: ['owner', 'engineer'],
  owner: ['owner'],
};

function signedIn(principal: Principal | null): Principal {
  if (principal === null) throw new UnauthenticatedError();
  return principal;
}

function memberPolicy(name: keyof typeof ROLES): Policy<Member> {
  return {
    name,
    admit(principal) {
      const { user, workspace } = signedIn(principal);
      if (workspace === null) throw new ForbiddenError('no-workspace', 'You are not a member of any workspace.');
      if (!ROLES[name].includes(workspace.role)) {
        throw new ForbiddenError('forbidden', `Your role, ${workspace.role}, does not allow this.`);
      }
      return { userId: user.id, workspaceId: workspace.id, role: workspace.role };
    },
  };
}

/** Open to everybody, signed in or not. */
export const PUBLIC: Policy<Principal | null> = { name: 'public', admit: (principal) => principal };
export const SIGNED_IN: Policy<Principal> = { name: 'signed-in', admit: signedIn };
export const READ = memberPolicy('read');
export const EDIT = memberPolicy('edit');
export const OWNER = memberPolicy('owner');
