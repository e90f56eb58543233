import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { signInSchema, type SignIn } from '#common/schemas/api/session.ts';
import { Button } from '#frontend/components/button.tsx';
import { TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { ApiError } from '#frontend/lib/api-client.ts';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useSignIn } from '../api/session.ts';

export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const signIn = useSignIn();
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, setFocus, formState } = useForm<SignIn>({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: '', password: '' },
  });
  const submit = handleSubmit(async (values) => {
    setProblem(null);
    try {
      await signIn.mutateAsync(values);
      onSignedIn();
    } catch (error) {
      setProblem(wordsOfSignIn(error) ?? applyProblems(error, ['email', 'password'], setError));
      setFocus('password', { shouldSelect: true });
    }
  });
  return (
    <form noValidate onSubmit={submit} className="max-w-sm">
      <FormError>{problem}</FormError>
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        error={formState.errors.email?.message}
        {...register('email')}
      />
      <TextField
        className="mt-3"
        label="Password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" variant="primary" className="mt-4" isBusy={formState.isSubmitting}>
        Sign in
      </Button>
    </form>
  );
}

function wordsOfSignIn(error: unknown): string | null {
  if (!(error instanceof ApiError)) return null;
  if (error.status === 401) return 'This e-mail address and password do not belong together.';
  if (error.status === 429) return error.problem?.detail ?? 'Too many attempts. Wait a few minutes and try again.';
  return null;
}
