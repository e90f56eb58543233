import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ApiError } from '#frontend/lib/api-client.ts';
import { ErrorState } from './states.tsx';

afterEach(cleanup);

describe('ErrorState', () => {
  it('shows the id of the request and tries again', () => {
    const onRetry = vi.fn();
    const problem = {
      type: 'about:blank',
      title: 'Error',
      status: 500,
      code: 'internal',
      requestId: 'b41f',
      errors: [],
    };
    render(<ErrorState title="No projects." error={new ApiError(500, problem)} onRetry={onRetry} />);
    expect(screen.getByRole('alert').textContent).toContain('b41f');
    fireEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(onRetry).toHaveBeenCalledOnce();
  });

  it('shows nothing of an unknown error but that there was one', () => {
    render(<ErrorState title="No projects." error={new Error('secret detail')} />);
    expect(screen.getByRole('alert').textContent).not.toContain('secret');
  });
});
