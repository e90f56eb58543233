import { fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import {
  buildSession,
  mockApi,
  problem,
  renderPage,
  resetUi,
  type Answer,
  type SentRequest,
} from '#test/support/ui.tsx';
import { SignInForm } from './sign-in-form.tsx';

afterEach(resetUi);

function renderForm(answer: Answer): { onSignedIn: ReturnType<typeof vi.fn>; sent: SentRequest[] } {
  const onSignedIn = vi.fn();
  const sent = mockApi(({ method }) => (method === 'GET' ? { body: buildSession(null) } : answer));
  renderPage(<SignInForm onSignedIn={onSignedIn} />);
  return { onSignedIn, sent };
}

function fill(email: string, password: string): void {
  fireEvent.change(screen.getByLabelText('E-mail'), { target: { value: email } });
  fireEvent.change(screen.getByLabelText('Password'), { target: { value: password } });
  fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
}

describe('SignInForm', () => {
  it('signs in with what was typed', async () => {
    const { onSignedIn, sent } = renderForm({ body: buildSession() });
    fill('person@tarnfold.example', 'a long pass phrase');
    await waitFor(() => expect(onSignedIn).toHaveBeenCalledOnce());
    expect(sent.at(-1)).toMatchObject({
      method: 'POST',
      path: '/session',
      body: { email: 'person@tarnfold.example', password: 'a long pass phrase' },
    });
  });

  it('asks for what is missing and sends nothing', async () => {
    const { sent } = renderForm({ body: buildSession() });
    fill('', '');
    expect(await screen.findByText('Type your e-mail address.')).toBeTruthy();
    expect(screen.getByText('Type your password.')).toBeTruthy();
    expect(sent.filter(({ method }) => method === 'POST')).toEqual([]);
  });

  it('does not tell which of both was wrong', async () => {
    const { onSignedIn } = renderForm(problem(401, 'wrong-credentials'));
    fill('person@tarnfold.example', 'guess');
    expect(await screen.findByText(/do not belong together/)).toBeTruthy();
    expect(onSignedIn).not.toHaveBeenCalled();
  });

  it('says when to try again after too many attempts', async () => {
    renderForm(problem(429, 'too-many-attempts', { detail: 'Too many attempts. Try again in 60 s.' }));
    fill('person@tarnfold.example', 'guess');
    expect(await screen.findByText(/Try again in 60 s/)).toBeTruthy();
  });

  it('keeps what was typed when the server is not reached', async () => {
    renderForm('unreachable');
    fill('person@tarnfold.example', 'a long pass phrase');
    expect(await screen.findByText(/cannot be reached/)).toBeTruthy();
    expect(screen.getByLabelText('E-mail')).toHaveProperty('value', 'person@tarnfold.example');
  });
});
