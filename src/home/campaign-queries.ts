// The campaign as the public sees it: the figure, its parts, the reach and the stages.
import { queryOptions } from '@tanstack/react-query';
import { campaignSchema } from '#shared/campaign/campaign-schemas.ts';
import type { Api } from '#src/lib/api.ts';

export const campaignQuery = (api: Api) =>
  queryOptions({
    queryKey: ['campaign'],
    queryFn: ({ signal }) => api.get(campaignSchema, '/api/campaign', signal),
  });
