import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { changePasswordSchema, type ChangePassword, type Session } from '#common/schemas/api/session.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { Button } from '#frontend/components/button.tsx';
import { TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { useToast } from '#frontend/components/toast.tsx';
import { ApiError } from '#frontend/lib/api-client.ts';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useChangePassword } from '../api/change-password.ts';

export interface ChangePasswordFormProps {
  email: string;
  /** The server gives a new session with the new password. */
  onRenewed: (session: Session) => void;
}

export function ChangePasswordForm({ email, onRenewed }: ChangePasswordFormProps) {
  const change = useChangePassword(onRenewed);
  const toast = useToast();
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, reset, formState } = useForm<ChangePassword>({
    resolver: zodResolver(changePasswordSchema),
    defaultValues: { currentPassword: '', newPassword: '' },
  });
  const submit = handleSubmit(async (values) => {
    setProblem(null);
    try {
      await change.mutateAsync(values);
      reset();
      toast({ text: 'The password is changed. You stay signed in here and nowhere else.' });
    } catch (error) {
      if (error instanceof ApiError && error.problem?.code === 'wrong-credentials') {
        setError('currentPassword', { message: 'This is not your current password.' }, { shouldFocus: true });
      } else {
        setProblem(applyProblems(error, ['currentPassword', 'newPassword'], setError));
      }
    }
  });
  return (
    <form noValidate onSubmit={submit} className="max-w-sm">
      <FormError>{problem}</FormError>
      {/* Tells password managers whose password this is. */}
      <input type="email" autoComplete="username" value={email} readOnly hidden />
      <TextField
        label="Current password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.currentPassword?.message}
        {...register('currentPassword')}
      />
      <TextField
        className="mt-3"
        label="New password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${LIMITS.passwordMinLength} characters`}
        error={formState.errors.newPassword?.message}
        {...register('newPassword')}
      />
      <Button type="submit" variant="primary" className="mt-4" isBusy={formState.isSubmitting}>
        Change the password
      </Button>
    </form>
  );
}
