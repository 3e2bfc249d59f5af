import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { ApiProblem } from './api';

/** A problem that the server names (403, 404, 422 …) does not go away by asking again; a lost connection may. */
const mayHelpToRetry = (failures: number, error: Error): boolean =>
  failures < 3 && !(error instanceof ApiProblem && error.status < 500 && error.status !== 429);

export function makeQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: { retry: mayHelpToRetry, staleTime: 30_000, refetchOnWindowFocus: false },
      mutations: { retry: false, networkMode: 'always' },
    },
  });
}

/** Gives an island its own store of server answers. */
export function ServerData({ children }: { readonly children: ReactNode }) {
  const [client] = useState(makeQueryClient);
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
