import { describe, expect, it, vi } from 'vitest';
import { ApiError } from './api-client.ts';
import { applyProblems, wordsOfError } from './form-errors.ts';

const problemOf = (errors: { path: string; message: string }[], status = 400): ApiError =>
  new ApiError(status, { type: 'about:blank', title: 'Bad Request', status, code: 'x', requestId: 'r', errors });

describe('applyProblems', () => {
  it('puts each problem at its field', () => {
    const setError = vi.fn();
    const rest = applyProblems(problemOf([{ path: 'name', message: 'Too long.' }]), ['name'], setError);
    expect(setError).toHaveBeenCalledWith('name', { type: 'server', message: 'Too long.' });
    expect(rest).toBeNull();
  });

  it('finds a field inside a longer path', () => {
    const setError = vi.fn();
    applyProblems(problemOf([{ path: 'document.name', message: 'Too long.' }]), ['name'], setError);
    expect(setError).toHaveBeenCalledWith('name', { type: 'server', message: 'Too long.' });
  });

  it('returns what belongs to no field', () => {
    const setError = vi.fn();
    expect(applyProblems(problemOf([{ path: 'version', message: 'Not known.' }]), ['name'], setError)).toBe(
      'Not known.',
    );
    expect(setError).not.toHaveBeenCalled();
  });

  it('says in words what went wrong when no place is named', () => {
    expect(applyProblems(new ApiError(0, null), ['name'], vi.fn())).toMatch(/cannot be reached/);
    expect(applyProblems(new Error('x'), ['name'], vi.fn())).toMatch(/went wrong/);
  });
});

describe('wordsOfError', () => {
  it.each([
    [0, /cannot be reached/],
    [403, /role/],
    [404, /not exist/],
    [409, /Someone else/],
    [418, /418/],
  ])('status %i: says what is the matter', (status, words) => {
    expect(wordsOfError(new ApiError(status, null))).toMatch(words);
  });
});
