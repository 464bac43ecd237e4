// What is owed today, asked anew at each visit: others are at work too.
import { queryOptions } from '@tanstack/react-query';
import { todaySchema } from '#shared/today/today-schemas.ts';
import type { Api } from '#src/lib/api.ts';

export const TODAY = ['today'] as const;
const ASK_AGAIN_MS = 60_000;

export const todayQuery = (api: Api) =>
  queryOptions({
    queryKey: TODAY,
    queryFn: ({ signal }) => api.get(todaySchema, '/api/desk/today', signal),
    staleTime: 0,
    refetchInterval: ASK_AGAIN_MS,
  });
