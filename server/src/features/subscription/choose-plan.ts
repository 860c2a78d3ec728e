import { record } from '../../core/audit';
import { config } from '../../core/config';
import { type Context } from '../../core/context';
import { platformRow, platformRows, withPlatform, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { stripe } from '../../core/payments/stripe';
import { found, invalid, problem } from '../../core/problems/problem';
import { callCardService } from '../payments/card-calls';
import { cardCustomerOf, cardPriceOf } from './card-plan';
import { changeState, noteEvent } from './change-state';
import { showSubscription } from './show-subscription';
import {
  planColumns,
  type PlanRow,
  subscriptionColumns,
  type SubscriptionRow,
} from './subscription-row';

type Answer = AnswerOf<'subscription.choose'>;

/**
 * Chooses a plan. Who pays already is moved to it; anybody else is sent to the card page first, and
 * is on the plan when that says so. A smaller plan takes nothing away: past its limits nothing more
 * can be added.
 */
export async function choosePlan(context: Context, planId: string): Promise<Answer> {
  const plan = await platformRow<PlanRow>(
    `select ${planColumns} from plans p where p.id = $planId and p.offered`,
    { planId },
  );
  if (!plan) throw invalid([{ pointer: '/planId', in: 'body', detail: 'is not on offer' }]);
  const subscription = await subscriptionOf(context.shopId);
  if (subscription.held_from !== null) {
    throw problem(
      'conflict',
      'The platform paused this shop: a plan can be chosen once it resumes it.',
    );
  }
  const url = await pay(context, subscription, plan);
  await withTenant(context, () =>
    record(context, 'plan chosen', { kind: 'plan', id: plan.id }, { plan: plan.name }),
  );
  return { url, subscription: await showSubscription(context) };
}

async function pay(
  context: Context,
  subscription: SubscriptionRow,
  plan: PlanRow,
): Promise<string | null> {
  const shopId = context.shopId;
  const pays = subscription.card_subscription !== null && subscription.state !== 'canceled';
  if (pays) {
    await moveCardSubscription(subscription, plan);
    await putOnPlan(shopId, plan, { now: context.now, byUserId: context.userId });
    return null;
  }
  if (plan.monthly_amount > 0) return cardPage(context, subscription, plan);
  await putOnPlan(shopId, plan, { now: context.now, byUserId: context.userId });
  await changeState(shopId, { event: 'resubscribed', now: context.now, byUserId: context.userId });
  return null;
}

export async function subscriptionOf(shopId: string): Promise<SubscriptionRow> {
  return found(
    await platformRow<SubscriptionRow>(
      `select ${subscriptionColumns} from subscriptions b where b.shop_id = $shopId`,
      { shopId },
    ),
  );
}

/** Moves what is paid for to the plan's price, from the next bill on. */
export async function moveCardSubscription(
  subscription: SubscriptionRow,
  plan: PlanRow,
): Promise<void> {
  const id = subscription.card_subscription;
  if (!id) return;
  const price = await cardPriceOf(plan);
  await callCardService(async () => {
    const present = await stripe().subscriptions.retrieve(id);
    const item = present.items.data[0];
    if (!item || item.price.id === price) return;
    await stripe().subscriptions.update(
      id,
      {
        items: [{ id: item.id, price }],
        proration_behavior: 'create_prorations',
        metadata: { shop: subscription.shop_id, plan: plan.id },
      },
      { idempotencyKey: `move-${id}-${price}-${subscription.version}` },
    );
  });
}

/** Notes the plan a shop is on from now. */
export function putOnPlan(
  shopId: string,
  plan: Pick<PlanRow, 'id' | 'name'>,
  by: { now: Date; byUserId?: string | null; note?: string },
): Promise<void> {
  return withPlatform(async () => {
    const changed = await platformRows(
      `update subscriptions set plan_id = $planId
       where shop_id = $shopId and plan_id <> $planId returning id`,
      { shopId, planId: plan.id },
    );
    if (!changed.length) return;
    const note = by.note ? `${plan.name}: ${by.note}` : plan.name;
    await noteEvent(shopId, { event: 'plan_changed', now: by.now, byUserId: by.byUserId, note });
  });
}

/** A page of the card payment service on the platform's own account. Pressing twice is one page. */
async function cardPage(
  context: Context,
  subscription: SubscriptionRow,
  plan: PlanRow,
): Promise<string> {
  const shopId = context.shopId;
  const owner = await platformRow<{ email: string }>('select email from users where id = $id', {
    id: context.userId,
  });
  const customer = await cardCustomerOf(shopId, subscription.card_customer, owner?.email);
  const price = await cardPriceOf(plan);
  const back = `${config().publicUrl}/shop/subscription`;
  // A page lives for a day; within an hour the same choice gets the same page.
  const hour = Math.floor(context.now.getTime() / 3_600_000);
  const session = await callCardService(() =>
    stripe().checkout.sessions.create(
      {
        mode: 'subscription',
        customer,
        client_reference_id: shopId,
        line_items: [{ price, quantity: 1 }],
        metadata: { shop: shopId, plan: plan.id },
        subscription_data: { metadata: { shop: shopId, plan: plan.id } },
        success_url: `${back}?paid=1`,
        cancel_url: `${back}?cancelled=1`,
      },
      {
        idempotencyKey: `subscribe-${shopId}-${price}-${hour}-${subscription.card_subscription}`,
      },
    ),
  );
  await platformRows('update subscriptions set card_checkout = $session where shop_id = $shopId', {
    shopId,
    session: session.id,
  });
  // The page of this hour may have been paid a moment ago, before the browser came back.
  if (!session.url) throw problem('conflict', 'This plan was paid just now: reload the page.');
  return session.url;
}
