// What every page stands in, the same on the server and in the browser.
import { StrictMode, type ReactNode } from 'react';
import {
  HydrationBoundary,
  QueryClientProvider,
  type DehydratedState,
  type QueryClient,
} from '@tanstack/react-query';
import type { Api } from '#src/lib/api.ts';
import { ApiContext } from '#src/lib/use-api.ts';

type Props = { queryClient: QueryClient; api: Api; query: DehydratedState | undefined; children: ReactNode };

export function Site({ queryClient, api, query, children }: Props) {
  return (
    <StrictMode>
      <QueryClientProvider client={queryClient}>
        <HydrationBoundary state={query}>
          <ApiContext value={api}>{children}</ApiContext>
        </HydrationBoundary>
      </QueryClientProvider>
    </StrictMode>
  );
}
