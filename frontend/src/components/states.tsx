import type { ReactNode } from 'react';
import { ApiError } from '#frontend/lib/api-client.ts';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { Button } from './button.tsx';

/** Says what is being fetched; shown only after a moment, so that fast answers do not flicker. */
export function Loading({ what = 'Loading' }: { what?: string }) {
  return (
    <p role="status" className="min-h-24 animate-[appear_1ms_350ms_both] py-10 text-muted">
      {what} …
    </p>
  );
}

/** Nothing here yet, and what to do about it. */
export function Empty({ title, children, actions }: { title: string; children?: ReactNode; actions?: ReactNode }) {
  return (
    <div className="max-w-xl py-12">
      <p className="text-lead font-light">{title}</p>
      {children !== undefined && <div className="mt-2 text-muted">{children}</div>}
      {actions !== undefined && <div className="mt-6 flex flex-wrap gap-3">{actions}</div>}
    </div>
  );
}

export interface ErrorStateProps {
  title: string;
  error: unknown;
  onRetry?: () => void;
}

/** What failed, why as far as it is known, the request's id, and a way on. */
export function ErrorState({ title, error, onRetry }: ErrorStateProps) {
  const requestId = error instanceof ApiError ? error.problem?.requestId : undefined;
  return (
    <div role="alert" className="my-8 max-w-xl border-l-2 border-rust pl-5">
      <p className="text-lead font-light">{title}</p>
      <p className="mt-1 text-muted">{wordsOfError(error)}</p>
      {requestId !== undefined && (
        <p className="mt-1 text-small text-muted">
          Request <code className="text-ink">{requestId}</code>: the server&rsquo;s log has the detail under this id.
        </p>
      )}
      {onRetry && (
        <Button className="mt-5" onClick={onRetry}>
          Try again
        </Button>
      )}
    </div>
  );
}

/** A line above a form for what belongs to none of its fields. */
export function FormError({ children }: { children: ReactNode }) {
  return (
    <div
      role="alert"
      className={children === null || children === undefined ? '' : 'mb-5 border-l-2 border-rust py-1 pl-4 text-rust'}
    >
      {children}
    </div>
  );
}
