import type { Role } from '#common/schemas/api/common.ts';
import type { UserRecord, WorkspaceMembership } from './records.types.ts';

/** Who sends a request, read from the database each time, so that a changed role or a removed member counts at once. */
export interface Principal {
  user: UserRecord;
  workspaces: readonly WorkspaceMembership[];
  /** The workspace at work in this session; null for somebody who is member of none. */
  workspace: WorkspaceMembership | null;
}

/** A principal inside a workspace: what the use cases need to know. */
export interface Member {
  userId: string;
  workspaceId: string;
  role: Role;
}
