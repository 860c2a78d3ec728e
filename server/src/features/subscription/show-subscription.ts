import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';
import { usageOf } from './plan-limits';
import {
  type EventRow,
  newestEvents,
  planColumns,
  type PlanRow,
  presentEvent,
  presentPlan,
  presentStanding,
  presentUsage,
  subscriptionColumns,
  type SubscriptionRow,
} from './subscription-row';

export function showSubscription(context: Context): Promise<AnswerOf<'subscription.show'>> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId };
    const subscription = found(
      await row<SubscriptionRow>(
        `select ${subscriptionColumns} from subscriptions b where b.shop_id = $shopId`,
        bind,
      ),
    );
    const plan = found(
      await row<PlanRow>(
        `select ${planColumns} from subscriptions b join plans p on p.id = b.plan_id
         where b.shop_id = $shopId`,
        bind,
      ),
    );
    const events = await rows<EventRow>(newestEvents, bind);
    return {
      ...presentStanding(subscription, plan, context.now),
      plan: presentPlan(plan),
      usage: presentUsage(plan, await usageOf(context)),
      events: events.map(presentEvent),
      version: subscription.version,
    };
  });
}

export function listPlans(context: Context): Promise<AnswerOf<'subscription.plans'>> {
  return withTenant(context, async () => {
    const plans = await rows<PlanRow>(
      `select ${planColumns} from plans p where p.offered order by p.monthly_amount, p.name`,
    );
    return { items: plans.map(presentPlan) };
  });
}
