import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { setupSchema, type Setup } from '#common/schemas/api/session.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { Button } from '#frontend/components/button.tsx';
import { TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { ApiError } from '#frontend/lib/api-client.ts';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useSetup } from '../api/session.ts';

const FIELDS = ['workspaceName', 'name', 'email', 'password'] as const;

/** First workspace and its owner, with the one-time token of the link that the server printed. */
export function SetupForm({ token, onDone }: { token: string; onDone: () => void }) {
  const setup = useSetup();
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<Setup>({
    resolver: zodResolver(setupSchema),
    defaultValues: { token, workspaceName: '', name: '', email: '', password: '' },
  });
  const { errors } = formState;
  const submit = handleSubmit(async (values) => {
    setProblem(null);
    try {
      await setup.mutateAsync(values);
      onDone();
    } catch (error) {
      setProblem(wordsOfSetup(error) ?? applyProblems(error, FIELDS, setError));
    }
  });
  return (
    <form noValidate onSubmit={submit} className="max-w-sm">
      <FormError>{problem}</FormError>
      <TextField
        label="Workspace"
        hint="Your team or company"
        error={errors.workspaceName?.message}
        {...register('workspaceName')}
      />
      <TextField
        className="mt-3"
        label="Your name"
        autoComplete="name"
        error={errors.name?.message}
        {...register('name')}
      />
      <TextField
        className="mt-3"
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...register('email')}
      />
      <TextField
        className="mt-3"
        label="Password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${LIMITS.passwordMinLength} characters`}
        error={errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" variant="primary" className="mt-4" isBusy={formState.isSubmitting}>
        Make the workspace
      </Button>
    </form>
  );
}

function wordsOfSetup(error: unknown): string | null {
  if (!(error instanceof ApiError) || ![401, 403, 404, 409, 410].includes(error.status)) return null;
  return 'This link has been used or is too old. Start the server again: it prints a new link as long as there is no owner.';
}
