import { tradeDayOf } from '@lib/domain';
import { systemContext, type Context } from '../../core/context';
import { databaseIsAway } from '../../core/database/away';
import { row, rows, withTenant, write } from '../../core/database/tenancy';
import { type Job } from '../../core/jobs/work';
import { type Log } from '../../core/logging';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { type RunFacts, buildStatementOfStore } from './build-statement-of-store';
import { monthsToState } from './fees-due';
import { moveRun } from './move-run';

/** Stores of one job; what is left after them is the next job's. */
const chunk = 200;
/** Statements after which rendering may begin, and the page is told how far it is. */
const batch = 20;
/** Tries before a store's statement is given up and shown. */
const mostTries = 3;

export interface RunJob {
  shopId: string;
  runId: string;
}

export const buildStatementsJob: Job = {
  queue: 'statements-build',
  async work(data, { log }) {
    const { shopId, runId } = data as unknown as RunJob;
    await buildStatements(systemContext(shopId, new Date()), runId, log);
  },
};

/**
 * Builds the next statements of a run, each in a transaction of its own.
 *
 * @returns whether there were any to build
 */
export async function buildStatements(context: Context, runId: string, log: Log): Promise<boolean> {
  const work = await withTenant(context, () => openRun(context, runId));
  if (!work) return false;
  let built = 0;
  for (const storeId of work.storeIds) {
    if (!(await buildOne(context, work.shop, work.run, storeId, log))) continue;
    built += 1;
    if (built % batch === 0) await moveRun(context, runId, ['render']);
  }
  await moveRun(context, runId, ['build', 'render']);
  return work.storeIds.length > 0;
}

async function openRun(
  context: Context,
  runId: string,
): Promise<{ shop: ShopFacts; run: RunFacts; storeIds: string[] } | undefined> {
  const bind = { shopId: context.shopId, runId };
  const run = await row<{ month: string; revision: number; startedAt: Date }>(
    `select month, revision, started_at as "startedAt" from statement_runs
     where shop_id = $shopId and id = $runId and state = 'building'`,
    bind,
  );
  if (!run) return undefined;
  const shop = await shopFacts(context);
  const stores = await rows<{ storeId: string }>(
    `select r.store_id as "storeId" from statement_run_stores r
     join stores s on s.shop_id = r.shop_id and s.id = r.store_id
     where r.shop_id = $shopId and r.run_id = $runId and r.state = 'waiting'
     order by s.number, s.id limit ${chunk}`,
    bind,
  );
  return {
    shop,
    storeIds: stores.map((store) => store.storeId),
    run: {
      id: runId,
      month: run.month,
      revision: run.revision,
      issuedOn: tradeDayOf(run.startedAt, shop.zone),
      months: await monthsToState(context, run.month),
    },
  };
}

async function buildOne(
  context: Context,
  shop: ShopFacts,
  run: RunFacts,
  storeId: string,
  log: Log,
): Promise<boolean> {
  try {
    return (await buildStatementOfStore(context, shop, run, storeId)) !== undefined;
  } catch (error) {
    // Without a database nothing can be written down either: the whole job is tried again.
    if (databaseIsAway(error)) throw error;
    log.error({ err: error, storeId }, 'a statement could not be built');
    await noteFailure(context, run.id, storeId, error);
    return false;
  }
}

/** One store's trouble must not keep the others from their statements. */
async function noteFailure(
  context: Context,
  runId: string,
  storeId: string,
  error: unknown,
): Promise<void> {
  // Figures that do not add up will not by trying again.
  const forGood = error instanceof RangeError;
  await withTenant(context, () =>
    write(
      `update statement_run_stores set attempt = attempt + 1, last_error = $words,
         state = case when $forGood or attempt + 1 >= ${mostTries} then 'failed' else state end
       where shop_id = $shopId and run_id = $runId and store_id = $storeId and state = 'waiting'`,
      {
        shopId: context.shopId,
        runId,
        storeId,
        forGood,
        words: (error instanceof Error ? error.message : String(error)).slice(0, 300),
      },
    ),
  );
}
