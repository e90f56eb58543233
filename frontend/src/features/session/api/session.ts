import { useMutation, useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { sessionSchema, type Session, type Setup, type SignIn } from '#common/schemas/api/session.ts';
import { api, onSignedOut, setCsrfToken } from '#frontend/lib/api-client.ts';

export const SESSION_KEY = ['session'];

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
    mutationFn: () => api.delete('/session', undefined, sessionSchema.optional()),
    onSuccess: () => endSession(client),
  });
}

export function useSelectWorkspace() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (workspaceId: string) => api.put('/session/workspace', { workspaceId }, sessionSchema),
    onSuccess: (session) => startSession(client, session),
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

/** Nothing that one person or workspace has seen stays in the cache for the next. */
function startSession(client: QueryClient, session: Session): void {
  client.clear();
  setCsrfToken(session.csrfToken);
  client.setQueryData(SESSION_KEY, session);
}

function endSession(client: QueryClient): void {
  client.clear();
  setCsrfToken(null);
}
