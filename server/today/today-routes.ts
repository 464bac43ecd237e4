// The desk's first page: what is owed to whom.
import { Router } from 'express';
import { todaySchema } from '#shared/today/today-schemas.ts';
import { deskPerson } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import { readToday } from './owed-service.ts';

export function createTodayRouter(deps: Deps): Router {
  const router = Router();
  router.get('/', async (req, res) => {
    res.json(todaySchema.parse(await readToday(deps.db, deskPerson(req), deps.clock.now())));
  });
  return router;
}
