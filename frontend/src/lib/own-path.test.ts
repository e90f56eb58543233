import { describe, expect, it } from 'vitest';
import { ownPath } from './own-path.ts';

describe('ownPath', () => {
  it('keeps path, query and fragment of this site', () => {
    expect(ownPath('/scenarios/1/supply?q=a#cell')).toBe('/scenarios/1/supply?q=a#cell');
  });

  it.each([
    null,
    '',
    'projects',
    'https://elsewhere.example/',
    '//elsewhere.example/',
    '/\\elsewhere.example/',
    '/%09/elsewhere.example',
    '/./%2e//elsewhere.example',
    'javascript:alert(1)',
    '/sign-in',
  ])('leads %s to a path of this site', (candidate) => {
    const path = ownPath(candidate);
    expect(path.startsWith('/')).toBe(true);
    expect(path.startsWith('//')).toBe(false);
    expect(new URL(path, 'https://own.example').origin).toBe('https://own.example');
    expect(path).not.toBe('/sign-in');
  });
});
