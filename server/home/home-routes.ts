// The public campaign as JSON, for our own pages and for anybody who builds on it; drawn once per change.
import { Router } from 'express';
import type { Deps } from '#server/deps.ts';
import { createDrawnOnce, keepAnswer, sendKept } from '#server/platform/pages/index.ts';
import { readCampaign } from './campaign-reads.ts';

export function createCampaignRouter(deps: Deps): Router {
  const drawn = createDrawnOnce(deps.changes, async () =>
    keepAnswer(JSON.stringify(await readCampaign(deps)), 'json'),
  );
  const router = Router();
  router.get('/', async (req, res) => {
    sendKept(req, res, await drawn.get('campaign'));
  });
  return router;
}
