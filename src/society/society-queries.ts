// The society's own details, asked once and printed at the foot of every page.
import { queryOptions } from '@tanstack/react-query';
import { societySchema } from '#shared/society/society-schemas.ts';
import type { Api } from '#src/lib/api.ts';

export const SOCIETY_KEY = ['society'] as const;

export const societyQuery = (api: Api) =>
  queryOptions({
    queryKey: SOCIETY_KEY,
    queryFn: ({ signal }) => api.get(societySchema, '/api/society', signal),
  });
