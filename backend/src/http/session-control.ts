import type { UserRecord } from '#backend/domain/records.types.ts';
import type { Principal } from '#backend/domain/principal.ts';

/** What routes may do with the session of a request. */
export interface SessionControl {
  /** Address of the client, behind as many proxies as the settings say. */
  readonly address: string;
  /** Checks credentials; does not sign in yet. */
  authenticate(credentials: { email: string; password: string }): Promise<UserRecord>;
  /** Signs in under a new session id. Whatever the old session held is gone. */
  begin(user: UserRecord, workspaceId: string | null): Promise<void>;
  /** Ends the session on the server and in the browser. */
  end(): Promise<void>;
  choose(workspaceId: string): Promise<void>;
  /** Who the session stands for now, after `begin`, `end` or `choose`. */
  principal(): Promise<Principal | null>;
  /** Token that unsafe requests of this session carry. */
  csrfToken(): string;
  hasToken(token: string | undefined): boolean;
}
