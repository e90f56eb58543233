/** The path to return to after signing in: one of this site only, anything else leads to the projects. */
export function ownPath(candidate: string | null): string {
  const fallback = '/projects';
  if (!candidate?.startsWith('/')) return fallback;
  try {
    const base = 'https://own.invalid';
    const url = new URL(candidate, base);
    if (url.origin !== base || url.pathname.startsWith('//') || url.pathname === '/sign-in') return fallback;
    return url.pathname + url.search + url.hash;
  } catch {
    return fallback;
  }
}
