import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';

import { ApiError } from './client';
import { keys } from './keys';

/** What the server refused stays refused; only silence and its own faults are worth another try. */
const mayRetry = (failures: number, error: unknown) =>
  failures < 2 && !(error instanceof ApiError && error.status > 0 && error.status < 500);

export function makeQueryClient(): QueryClient {
  // A session that has ended is noticed wherever it is noticed first.
  const onError = (error: unknown) => {
    if (error instanceof ApiError && error.status === 401) client.setQueryData(keys.me, null);
  };
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: { queries: { retry: mayRetry, staleTime: 15_000 } },
  });
  return client;
}
