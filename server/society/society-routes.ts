// The society's details for the foot of every page.
import { Router } from 'express';
import { societySchema } from '#shared/society/society-schemas.ts';
import type { Deps } from '#server/deps.ts';
import { getSociety } from './society-store.ts';

export function createSocietyRouter(deps: Deps): Router {
  const router = Router();
  router.get('/', async (_req, res) => {
    res.json(societySchema.parse(await getSociety(deps.db)));
  });
  return router;
}
