'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import type { ReactNode } from 'react';
import { ApiProblem } from './api';

function makeClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 10_000,
        retry: (count, error) =>
          !(error instanceof ApiProblem && error.status >= 400 && error.status < 500) && count < 2,
      },
    },
  });
}

/** One query cache per tab. */
export function QueryProvider({ children }: Readonly<{ children: ReactNode }>) {
  const [client] = useState(makeClient);
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
