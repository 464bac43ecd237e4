// What is owed today, asked anew at each visit: others are at work too. Never by a timer, which would keep an
// unattended desk signed in for good.
import { queryOptions } from '@tanstack/react-query';
import { todaySchema } from '#shared/today/today-schemas.ts';
import type { Api } from '#src/lib/api.ts';

export const TODAY = ['today'] as const;

export const todayQuery = (api: Api) =>
  queryOptions({
    queryKey: TODAY,
    queryFn: ({ signal }) => api.get(todaySchema, '/api/desk/today', signal),
    staleTime: 0,
  });
