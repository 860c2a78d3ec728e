import { mayWrite } from '@lib/domain';
import { type Context } from '../context';
import { row } from '../database/tenancy';
import { problem } from '../problems/problem';

/** A paused shop reads and exports everything and writes nothing; past due it has its plan's grace. */
export async function refuseWhilePaused(context: Context): Promise<void> {
  const subscription = await row<{ state: never; state_since: Date; grace_days: number }>(
    `select s.state, s.state_since, p.grace_days
     from subscriptions s join plans p on p.id = s.plan_id where s.shop_id = $shopId`,
    { shopId: context.shopId },
  );
  if (!subscription) return;
  if (
    !mayWrite(subscription.state, subscription.state_since, context.now, subscription.grace_days)
  ) {
    throw problem('shop-paused');
  }
}
