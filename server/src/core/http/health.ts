import { type RequestHandler } from 'express';
import { QueryTypes } from 'sequelize';
import { platformDb, tenantDb } from '../database/database';
import { jobs } from '../jobs/boss';

/** `/healthz`: the process runs. `/readyz`: it can reach the database and the job queue. */
export function health(): RequestHandler {
  return (request, response, next) => {
    if (request.path === '/healthz') {
      response.json({ status: 'up' });
    } else if (request.path === '/readyz') {
      void ready().then((checks) => {
        const up = Object.values(checks).every((state) => state === 'up');
        response.status(up ? 200 : 503).json({ status: up ? 'up' : 'down', checks });
      });
    } else {
      next();
    }
  };
}

async function ready(): Promise<Record<string, 'up' | 'down'>> {
  const check = (work: () => Promise<unknown>) =>
    Promise.race([
      work().then(() => 'up' as const),
      new Promise<'down'>((resolve) => setTimeout(resolve, 2000, 'down').unref()),
    ]).catch(() => 'down' as const);
  const [database, platform, queue] = await Promise.all([
    check(() => tenantDb().query('select 1', { type: QueryTypes.SELECT })),
    check(() => platformDb().query('select 1', { type: QueryTypes.SELECT })),
    check(async () => jobs().getQueueSize('sweep')),
  ]);
  return { database, platform, queue };
}
