import type { ReactNode } from 'react';

/** Said by screen readers, not shown. */
export function VisuallyHidden({ children }: { children: ReactNode }) {
  return <span className="sr-only">{children}</span>;
}
