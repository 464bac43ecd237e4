// The public face: the campaign put together from the rooms below.
export { readCampaign } from './campaign-reads.ts';
export { createCampaignRouter } from './home-routes.ts';
