'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';

/** What moves in the office asks the server by itself; a failed question is asked again, quietly. */
export function QueryProvider({ children }: { children: ReactNode }) {
  const [client] = useState(
    () =>
      new QueryClient({
        defaultOptions: { queries: { retry: 1, refetchOnWindowFocus: true, networkMode: 'always' } },
      }),
  );
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
