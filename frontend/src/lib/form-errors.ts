import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { ApiError } from './api-client.ts';

/**
 * Puts the problems of an API answer at the fields they belong to. `fields` maps problem paths to form fields; what
 * belongs to none is returned as one text for the whole form, null when there is nothing left to say.
 */
export function applyProblems<T extends FieldValues>(
  error: unknown,
  fields: readonly FieldPath<T>[],
  setError: UseFormSetError<T>,
): string | null {
  if (!(error instanceof ApiError)) return 'Something went wrong in this page. Reload it and try again.';
  const rest: string[] = [];
  for (const problem of error.problem?.errors ?? []) {
    const field = fields.find((name) => problem.path === name || problem.path.endsWith(`.${name}`));
    if (field) setError(field, { type: 'server', message: problem.message });
    else rest.push(problem.message);
  }
  if (rest.length > 0) return rest.join(' ');
  return error.problem && error.problem.errors.length > 0 ? null : wordsOfError(error);
}

/** An error as a person reads it, with what to do where that is known. */
export function wordsOfError(error: unknown): string {
  if (!(error instanceof ApiError)) return 'Something went wrong in this page.';
  if (error.isOffline) return 'The server cannot be reached. What you typed is still here.';
  if (error.status === 409) return 'Someone else has changed this meanwhile. Reload to see it.';
  if (error.status === 403) return 'Your role does not allow this.';
  if (error.status === 404) return 'This does not exist any more.';
  return error.message;
}
