import { QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { ToastProvider } from '#frontend/components/toast.tsx';
import { watchSession } from '#frontend/features/session/api/session.ts';
import { createQueryClient } from '#frontend/lib/query-client.ts';

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(() => {
    const made = createQueryClient();
    watchSession(made);
    return made;
  });
  return (
    <QueryClientProvider client={client}>
      <ToastProvider>{children}</ToastProvider>
    </QueryClientProvider>
  );
}
