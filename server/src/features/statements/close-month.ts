import { type Month, monthBounds, monthOf, previousMonth, statementDueAt } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { enqueue } from '../../core/jobs/boss';
import { announce } from '../../core/live/live';
import { invalid, problem } from '../../core/problems/problem';
import { type ShopFacts, shopFacts } from '../../core/shop-facts';
import { monthName } from './document-names';

/** What stands in the way of closing a month; nothing when it may be closed. */
export async function obstacleToClose(
  context: Context,
  shop: ShopFacts,
  month: Month,
): Promise<string | undefined> {
  if (new Date(monthBounds(month, shop.zone).until) > context.now) {
    return `${monthName(month, shop.locale)} is not over yet.`;
  }
  const later = await row<{ month: Month }>(
    `select month from statement_runs where shop_id = $shopId and month >= $month
     order by month desc limit 1`,
    { shopId: context.shopId, month },
  );
  if (!later) return undefined;
  return later.month === month
    ? `${monthName(month, shop.locale)} is closed already.`
    : `${monthName(later.month, shop.locale)} is closed already, and what came before stands on it.`;
}

/**
 * Begins a month close: one run a month and shop, with one row for every store to state. The
 * statements themselves are built, rendered and mailed by the worker, woken with the same commit.
 */
export function closeMonth(context: Context, month: Month): Promise<string> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    if (new Date(monthBounds(month, shop.zone).until) > context.now) {
      throw invalid([{ pointer: '/month', detail: 'is not over yet' }]);
    }
    const obstacle = await obstacleToClose(context, shop, month);
    if (obstacle) throw problem('conflict', obstacle);
    const id = uuid();
    const [run] = await write<{ id: string }>(
      `insert into statement_runs (shop_id, id, month, state, started_by, started_at)
       values ($shopId, $id, $month, 'building', $userId, $now)
       on conflict (shop_id, month, revision) do nothing returning id`,
      { shopId: context.shopId, id, month, userId: context.userId, now: context.now },
    );
    if (!run) {
      throw problem(
        'conflict',
        `${monthName(month, shop.locale)} is being closed by somebody else.`,
      );
    }
    await addStores(context, id);
    await record(context, 'month closed', { kind: 'statement_run', id }, { month });
    await announce(context, 'statement-run', id);
    await enqueue('statements-build', { shopId: context.shopId, runId: id });
    return id;
  });
}

/** Every store the shop works for; one that was ended only while something of it is open. */
async function addStores(context: Context, runId: string): Promise<void> {
  await write(
    `insert into statement_run_stores (shop_id, id, run_id, store_id)
     select s.shop_id, gen_random_uuid(), $runId, s.id from stores s
     where s.shop_id = $shopId and (s.ended_at is null or exists (
       select 1 from entries e
       where e.shop_id = s.shop_id and e.store_id = s.id and e.account in ('unbilled', 'receivable')
       group by e.account having sum(e.amount) <> 0))`,
    { shopId: context.shopId, runId },
  );
}

/** The month that the shop's schedule says should be closed by now and is not; the latest one. */
export async function monthDueBySchedule(
  context: Context,
  shop: ShopFacts,
): Promise<Month | undefined> {
  if (!shop.closeBySchedule) return undefined;
  const month = lastDueMonth(context.now, shop);
  const bind = { shopId: context.shopId, month };
  const done = await row(
    'select 1 from statement_runs where shop_id = $shopId and month >= $month limit 1',
    bind,
  );
  if (done) return undefined;
  // A shop that has no work of the month, as in its first days, is sent no empty statements.
  const work = await row(
    `select 1 from entries where shop_id = $shopId and to_char(posted_on, 'YYYY-MM') <= $month
     union all
     select 1 from contracts where shop_id = $shopId and to_char(starts_on, 'YYYY-MM') <= $month
     limit 1`,
    bind,
  );
  return work ? month : undefined;
}

/** The newest month whose statement day has come, on the shop's clock. */
export function lastDueMonth(
  now: Date,
  shop: Pick<ShopFacts, 'zone' | 'statementDay' | 'statementHour'>,
): Month {
  const ofLastMonth = previousMonth(monthOf(now, shop.zone));
  const dueAt = statementDueAt(ofLastMonth, shop.statementDay, shop.statementHour, shop.zone);
  return new Date(dueAt) <= now ? ofLastMonth : previousMonth(ofLastMonth);
}
