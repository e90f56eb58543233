import { useMutation } from '@tanstack/react-query';
import { sessionSchema, type ChangePassword, type Session } from '#common/schemas/api/session.ts';
import { api } from '#frontend/lib/api-client.ts';

/** Changes the password; the session is renewed and every other one of this account ends. */
export function useChangePassword(onRenewed: (session: Session) => void) {
  return useMutation({
    mutationFn: (body: ChangePassword) => api.post('/session/password', body, sessionSchema),
    onSuccess: onRenewed,
  });
}
