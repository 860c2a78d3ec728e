import { type SubscriptionState } from '@lib/domain';
import type Stripe from 'stripe';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { stripe } from '../../core/payments/stripe';
import { callCardService } from '../payments/card-calls';
import { changeState } from './change-state';
import { putOnPlan, subscriptionOf } from './choose-plan';
import { type SubscriptionRow } from './subscription-row';

const idShape = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

/**
 * Brings a shop's subscription to what the card payment service says of it now. The object is read
 * again each time, so events may come late, twice and in any order.
 *
 * @param paid a bill was paid just now: that alone opens a shop paused for want of payment
 */
export async function followCardSubscription(id: string, now: Date, paid = false): Promise<void> {
  const subscription = await callCardService(() => stripe().subscriptions.retrieve(id));
  const shopId = await shopOf(subscription);
  if (!shopId) return;
  await withPlatform(async () => {
    await platformRow('select 1 from subscriptions where shop_id = $shopId for update', { shopId });
    const ours = await subscriptionOf(shopId);
    if (!(await link(ours, subscription, now))) return;
    await follow(ours, subscription, now, paid);
  });
}

/** Which of our shops pays by this subscription: the one that keeps it, or the one it was made for. */
async function shopOf(subscription: Stripe.Subscription): Promise<string | undefined> {
  const keeper = await platformRow<{ shop_id: string }>(
    'select shop_id from subscriptions where card_subscription = $id',
    { id: subscription.id },
  );
  if (keeper) return keeper.shop_id;
  const named = subscription.metadata.shop ?? '';
  if (!idShape.test(named)) return undefined;
  const shop = await platformRow<{ shop_id: string }>(
    'select shop_id from subscriptions where shop_id = $named',
    { named },
  );
  return shop?.shop_id;
}

const lives = (status: Stripe.Subscription.Status): boolean =>
  status === 'active' || status === 'trialing' || status === 'past_due';

/** Keeps a subscription that lives in place of one that does not. False: it is of no concern. */
async function link(
  ours: SubscriptionRow,
  subscription: Stripe.Subscription,
  now: Date,
): Promise<boolean> {
  if (ours.card_subscription === subscription.id) return true;
  if (!lives(subscription.status)) return false;
  await platformRows(
    `update subscriptions set card_subscription = $id, card_customer = $customer,
       card_checkout = null where shop_id = $shopId`,
    {
      shopId: ours.shop_id,
      id: subscription.id,
      customer:
        typeof subscription.customer === 'string'
          ? subscription.customer
          : subscription.customer.id,
    },
  );
  // Taking a plan again is what revives an ended subscription, and pays for one that was not.
  if (subscription.status !== 'past_due') {
    await changeState(ours.shop_id, { event: 'resubscribed', now });
  }
  return true;
}

const unpaid: SubscriptionState[] = ['past_due', 'trialing'];

async function follow(
  ours: SubscriptionRow,
  subscription: Stripe.Subscription,
  now: Date,
  paid: boolean,
): Promise<void> {
  const shopId = ours.shop_id;
  const item = subscription.items.data[0];
  await platformRows(
    `update subscriptions set card_checked_at = $now,
       current_period_ends_at = to_timestamp($periodEnd::double precision)
     where shop_id = $shopId`,
    { shopId, now, periodEnd: item?.current_period_end ?? null },
  );
  if (item) await followPlan(shopId, item.price.id, now);
  switch (subscription.status) {
    case 'active':
    case 'trialing':
      if (paid || unpaid.includes(ours.held_from ?? ours.state)) {
        await changeState(shopId, { event: 'payment_succeeded', now });
      }
      return;
    case 'past_due':
    case 'unpaid':
      await changeState(shopId, { event: 'payment_failed', now });
      return;
    case 'canceled':
    case 'incomplete_expired':
      await changeState(shopId, { event: 'canceled', now });
  }
}

async function followPlan(shopId: string, price: string, now: Date): Promise<void> {
  const plan = await platformRow<{ id: string; name: string }>(
    'select id, name from plans where card_price = $price',
    { price },
  );
  if (plan) await putOnPlan(shopId, plan, { now });
}

/** Asks how a card page ended, and after the subscription it led to. */
export async function followCheckout(sessionId: string, now: Date): Promise<void> {
  const session = await callCardService(() => stripe().checkout.sessions.retrieve(sessionId));
  if (session.mode !== 'subscription' || session.status === 'open') return;
  await platformRows(
    'update subscriptions set card_checkout = null where card_checkout = $sessionId',
    { sessionId },
  );
  const made = session.subscription;
  const id = typeof made === 'string' ? made : made?.id;
  if (id) await followCardSubscription(id, now);
}

/** Asks after everything a shop is paid by, without waiting to be told. */
export async function askAfterPayment(shopId: string, now: Date): Promise<void> {
  const { card_checkout, card_subscription } = await subscriptionOf(shopId);
  if (card_checkout) await followCheckout(card_checkout, now);
  if (card_subscription) await followCardSubscription(card_subscription, now);
}
