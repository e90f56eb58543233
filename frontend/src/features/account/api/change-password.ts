import { useMutation } from '@tanstack/react-query';
import { z } from 'zod';
import type { ChangePassword } from '#common/schemas/api/session.ts';
import { api } from '#frontend/lib/api-client.ts';

/** Changes the password; every other session of this account ends with it. */
export function useChangePassword() {
  return useMutation({ mutationFn: (body: ChangePassword) => api.put('/session/password', body, z.unknown()) });
}
