import type { QueryClient } from '@tanstack/react-query';
import { SCENARIOS_KEY } from './list-scenarios.ts';

/** Fetches anew what a changed scenario appears in: the lists, and the projects that count them. */
export function refreshLists(client: QueryClient): () => Promise<void> {
  return async () => {
    await Promise.all([
      client.invalidateQueries({ queryKey: [...SCENARIOS_KEY, 'list'] }),
      client.invalidateQueries({ queryKey: ['projects'] }),
    ]);
  };
}
