import { sql } from 'drizzle-orm';
import { Router } from 'express';
import { AppError } from '#shared/errors.ts';
import type { Database } from '../db/client.ts';
import { withDeadline } from './deadline.ts';

/**
 * `/healthz`: the process answers. `/readyz`: it can do its work, that is, PostgreSQL answers
 * within two seconds; 503 otherwise, and while the server is shutting down.
 */
export function healthRoutes(db: Database, isShuttingDown: () => boolean): Router {
  const router = Router();
  router.get('/healthz', (_request, response) => {
    response.setHeader('Cache-Control', 'no-store').json({ status: 'ok' });
  });
  router.get('/readyz', async (_request, response) => {
    if (isShuttingDown()) throw new AppError('unavailable');
    await withDeadline(2_000, db.execute(sql`select 1`));
    response.setHeader('Cache-Control', 'no-store').json({ status: 'ready' });
  });
  return router;
}
