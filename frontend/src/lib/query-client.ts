import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api-client.ts';

/** A client whose queries try again only where that can help: the server was not reached or is not ready. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, error) =>
          failures < 2 && error instanceof ApiError && (error.status === 0 || error.status === 503),
        retryDelay: (failures) => 500 * 2 ** failures,
        networkMode: 'always',
      },
      mutations: { retry: false, networkMode: 'always' },
    },
  });
}
