import { type CountedThing, type Counts, limitsNotice, mayAdd } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { found, problem } from '../../core/problems/problem';

/** What a shop uses of its plan: what stands, not what ended. */
export async function usageOf(context: Pick<Context, 'shopId'>): Promise<Counts> {
  return found(
    await row<Counts>(
      `select
         (select count(*)::int from stores where shop_id = $shopId and ended_at is null) as stores,
         (select count(*)::int from machines m join stores s on s.shop_id = m.shop_id and s.id = m.store_id
          where m.shop_id = $shopId and m.state <> 'retired' and s.ended_at is null) as machines,
         (select count(*)::int from memberships where shop_id = $shopId and ended_at is null
          and role in ('shop_owner', 'office', 'tech')) as crew`,
      { shopId: context.shopId },
    ),
  );
}

/** What the plan of the shop allows, or undefined for a shop without a subscription. */
async function limitsOf(context: Pick<Context, 'shopId'>): Promise<Counts | undefined> {
  return row<Counts>(
    `select p.store_limit as stores, p.machine_limit as machines, p.crew_limit as crew
     from subscriptions s join plans p on p.id = s.plan_id where s.shop_id = $shopId`,
    { shopId: context.shopId },
  );
}

/**
 * Refuses what would go past the plan, before it is added. Two who add at once take turns on the
 * shop's usage row, so that the last free place is given once.
 */
export function refusePastLimit(
  context: Context,
  what: CountedThing,
  adding: number,
): Promise<void> {
  return withTenant(context, async () => {
    await write(
      `insert into shop_usage (shop_id, id) values ($shopId, $id)
       on conflict (shop_id) do update set counted_at = shop_usage.counted_at`,
      { shopId: context.shopId, id: uuid() },
    );
    const limits = await limitsOf(context);
    if (!limits) return;
    const usage = await usageOf(context);
    if (mayAdd(limits, usage, what, adding)) return;
    const notice = limitsNotice(limits, usage).find((each) => each.counted === what);
    throw problem('plan-limit', notice?.words);
  });
}

/** Writes down what the shop uses, where the platform area can see it. */
export function countUsage(context: Context): Promise<void> {
  return withTenant(context, async () => {
    await write(
      `insert into shop_usage (shop_id, id, stores, machines, crew, counted_at)
       values ($shopId, $id, $stores, $machines, $crew, $now)
       on conflict (shop_id) do update set stores = excluded.stores, machines = excluded.machines,
         crew = excluded.crew, counted_at = excluded.counted_at`,
      { shopId: context.shopId, id: uuid(), ...(await usageOf(context)), now: context.now },
    );
  });
}
