import { fireEvent, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { applyTheme } from '#frontend/lib/theme.ts';
import { buildSession, mockApi, problem, renderPage, resetUi, type Answer } from '#test/support/ui.tsx';
import { AccountPage } from './account-page.tsx';

afterEach(() => {
  resetUi();
  applyTheme('system');
});

function open(answer: Answer = { body: { ...buildSession(), csrfToken: 'token-2' } }) {
  const sent = mockApi(({ method }) => (method === 'GET' ? { body: buildSession() } : answer));
  renderPage(<AccountPage />);
  return sent;
}

async function change(current: string, next: string): Promise<void> {
  fireEvent.change(await screen.findByLabelText('Current password'), { target: { value: current } });
  fireEvent.change(screen.getByLabelText('New password'), { target: { value: next } });
  fireEvent.click(screen.getByRole('button', { name: 'Change the password' }));
}

describe('AccountPage', () => {
  it('shows who one is and what one may do', async () => {
    open();
    expect(await screen.findByText('person@tarnfold.example')).toBeTruthy();
    expect(screen.getByText(/^engineer:/)).toBeTruthy();
  });

  it('changes the password and says what that means elsewhere', async () => {
    const sent = open();
    await change('the old pass phrase', 'a new pass phrase');
    expect(await screen.findByText(/signed in here and nowhere else/)).toBeTruthy();
    expect(sent.at(-1)).toMatchObject({ method: 'POST', path: '/session/password' });
    expect(screen.getByLabelText('New password')).toHaveProperty('value', '');
  });

  it('tells at the field that the current password is wrong', async () => {
    open(problem(401, 'wrong-credentials'));
    await change('not it', 'a new pass phrase');
    expect(await screen.findByText('This is not your current password.')).toBeTruthy();
    expect(screen.getByLabelText('Current password').getAttribute('aria-invalid')).toBe('true');
  });

  it('refuses a short password before it is sent', async () => {
    const sent = open();
    await change('the old pass phrase', 'short');
    expect(await screen.findByText('At least 12 characters.')).toBeTruthy();
    expect(sent.every(({ method }) => method === 'GET')).toBe(true);
  });

  it('sets the theme', async () => {
    open();
    fireEvent.click(await screen.findByRole('radio', { name: 'Dark' }));
    expect(document.documentElement.dataset['theme']).toBe('dark');
  });
});
