import { z } from 'zod';
import { LIMITS } from '../limits.ts';
import { nameSchema, roleSchema, uuidSchema } from './common.ts';

export const emailSchema = z.email('This is not an e-mail address.').max(LIMITS.emailLength);

/** A password to be set. Signing in accepts any text, so that the answer does not tell what could be one. */
export const newPasswordSchema = z
  .string()
  .min(LIMITS.passwordMinLength, `At least ${LIMITS.passwordMinLength} characters.`)
  .max(LIMITS.passwordMaxLength, `At most ${LIMITS.passwordMaxLength} characters.`);

export const signInSchema = z.strictObject({
  email: z.string().min(1, 'Type your e-mail address.').max(LIMITS.emailLength),
  password: z.string().min(1, 'Type your password.').max(LIMITS.passwordMaxLength),
});
export type SignIn = z.infer<typeof signInSchema>;

/** GET /session: who is signed in (null: nobody) and the token that every unsafe request carries in `X-CSRF-Token`. */
export const sessionSchema = z.strictObject({
  csrfToken: z.string(),
  user: z.strictObject({ id: uuidSchema, email: z.string(), name: z.string() }).nullable(),
  workspace: z.strictObject({ id: uuidSchema, name: z.string(), role: roleSchema, isDemo: z.boolean() }).nullable(),
  workspaces: z.array(z.strictObject({ id: uuidSchema, name: z.string(), role: roleSchema })),
});
export type Session = z.infer<typeof sessionSchema>;

export const selectWorkspaceSchema = z.strictObject({ workspaceId: uuidSchema });

export const changePasswordSchema = z.strictObject({
  currentPassword: z.string().min(1, 'Type your current password.').max(LIMITS.passwordMaxLength),
  newPassword: newPasswordSchema,
});
export type ChangePassword = z.infer<typeof changePasswordSchema>;

/** POST /setup: makes the first workspace and its owner with the one-time token of the start log. */
export const setupSchema = z.strictObject({
  token: z.string().min(1).max(200),
  workspaceName: nameSchema,
  name: nameSchema,
  email: emailSchema,
  password: newPasswordSchema,
});
export type Setup = z.infer<typeof setupSchema>;
