import { useMutation, useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { sessionSchema, type Session, type Setup, type SignIn } from '#common/schemas/api/session.ts';
import { api, onSignedOut, setCsrfToken } from '#frontend/lib/api-client.ts';

export const SESSION_KEY = ['session'];

/** Set while nobody is signed in because somebody signed out: then no page is to be returned to. */
const HAS_LEFT_KEY = ['session', 'has-left'];

export function useSessionQuery() {
  return useQuery({ queryKey: SESSION_KEY, queryFn: fetchSession, staleTime: 5 * 60_000 });
}

export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SignIn) => api.post('/session', body, sessionSchema),
    onSuccess: (session) => startSession(client, session),
  });
}

export function useSetup() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: Setup) => api.post('/setup', body, sessionSchema),
    onSuccess: (session) => startSession(client, session),
  });
}

export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => api.delete('/session', undefined, sessionSchema),
    onSuccess: (session) => {
      client.setQueryData(HAS_LEFT_KEY, true);
      keepSession(client, session);
      client.removeQueries({ predicate: isNoSession });
    },
  });
}

/** Whether the last session here was ended on purpose, rather than by the server. */
export function useHasLeft(): boolean {
  return useQueryClient().getQueryData(HAS_LEFT_KEY) === true;
}

export function useSelectWorkspace() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (workspaceId: string) => api.put('/session/workspace', { workspaceId }, sessionSchema),
    onSuccess: async (session) => {
      keepSession(client, session);
      await client.resetQueries({ predicate: isNoSession });
    },
  });
}

/** Makes the pages ask for a sign-in as soon as the server no longer knows the session. */
export function watchSession(client: QueryClient): void {
  onSignedOut(() => {
    setCsrfToken(null);
    client.setQueryData<Session>(SESSION_KEY, (session) =>
      session ? { ...session, user: null, workspace: null, workspaces: [] } : session,
    );
  });
}

async function fetchSession(): Promise<Session> {
  const session = await api.get('/session', sessionSchema);
  setCsrfToken(session.csrfToken);
  return session;
}

/** Nothing that one person has seen stays in the cache for the next. */
function startSession(client: QueryClient, session: Session): void {
  client.removeQueries({ queryKey: HAS_LEFT_KEY });
  keepSession(client, session);
  client.removeQueries({ predicate: isNoSession });
}

/** Takes over a session that the server has renewed. */
export function keepSession(client: QueryClient, session: Session): void {
  setCsrfToken(session.csrfToken);
  client.setQueryData(SESSION_KEY, session);
}

function isNoSession({ queryKey }: { queryKey: readonly unknown[] }): boolean {
  return queryKey[0] !== SESSION_KEY[0];
}
