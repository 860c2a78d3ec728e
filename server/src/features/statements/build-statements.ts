import { tradeDayOf } from '@lib/domain';
import { systemContext, type Context } from '../../core/context';
import { databaseIsAway } from '../../core/database/away';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type Job } from '../../core/jobs/work';
import { type Log } from '../../core/logging';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { monthsToState } from './fees-due';
import { type RunFacts } from './built-statement';
import { moveRun } from './move-run';
import { noteFailures } from './note-failures';
import { stateStores } from './state-stores';

/** Stores of one job; what is left after them is the next job's. */
const chunk = 200;
/** Stores of one transaction: enough to share its cost, few enough to hold nobody up. */
const batch = 40;

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
 * Builds the next statements of a run, a batch of stores in a transaction.
 *
 * @returns whether there were any to build
 */
export async function buildStatements(context: Context, runId: string, log: Log): Promise<boolean> {
  const work = await withTenant(context, () => openRun(context, runId));
  if (!work) return false;
  for (let at = 0; at < work.storeIds.length; at += batch) {
    await buildBatch(context, work.shop, work.run, work.storeIds.slice(at, at + batch), log);
    await moveRun(context, runId, ['render']);
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

/** One store's trouble must not keep the others from their statements: then each is tried alone. */
async function buildBatch(
  context: Context,
  shop: ShopFacts,
  run: RunFacts,
  storeIds: readonly string[],
  log: Log,
): Promise<void> {
  try {
    const failed = await stateStores(context, shop, run, storeIds);
    for (const { storeId, error } of failed) logFailure(log, storeId, error);
  } catch (error) {
    // Without a database nothing can be written down either: the whole job is tried again.
    if (databaseIsAway(error)) throw error;
    const [storeId, ...others] = storeIds;
    if (storeId === undefined || others.length > 0) {
      for (const each of storeIds) await buildBatch(context, shop, run, [each], log);
      return;
    }
    logFailure(log, storeId, error);
    await withTenant(context, () => noteFailures(context, run.id, [{ storeId, error }]));
  }
}

function logFailure(log: Log, storeId: string, error: unknown): void {
  log.error({ err: error, storeId }, 'a statement could not be built');
}
