// The words of the appeal that is open now: what it is for, and what happens on a shortfall or a surplus.
import { queryOptions } from '@tanstack/react-query';
import { campaignSchema } from '#shared/campaign/campaign-schemas.ts';
import type { Api } from '#src/lib/api.ts';

const appealSchema = campaignSchema.pick({ name: true, wording: true });

export const appealQuery = (api: Api) =>
  queryOptions({
    queryKey: ['society', 'appeal'],
    queryFn: ({ signal }) => api.get(appealSchema, '/api/campaign', signal),
  });
