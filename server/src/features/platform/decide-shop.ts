import { type SubscriptionEvent } from '@lib/domain';
import { type PlatformContext } from '../../core/context';
import { platformRow, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { stripe } from '../../core/payments/stripe';
import { invalid, problem } from '../../core/problems/problem';
import { callCardService } from '../payments/card-calls';
import { type Change, changeState } from '../subscription/change-state';
import { moveCardSubscription, putOnPlan, subscriptionOf } from '../subscription/choose-plan';
import { planColumns, type PlanRow } from '../subscription/subscription-row';
import { showShop } from './read-shops';
import { recordPlatform } from './record-platform';

type ShopPage = AnswerOf<'platform.shop'>;

/** Puts a shop on any plan, also one that is not on offer. */
export async function changePlanOfShop(
  context: PlatformContext,
  shopId: string,
  body: { planId: string; note: string },
): Promise<ShopPage> {
  const subscription = await subscriptionOf(shopId);
  const plan = await platformRow<PlanRow>(
    `select ${planColumns} from plans p where p.id = $planId`,
    { planId: body.planId },
  );
  if (!plan) throw invalid([{ pointer: '/planId', in: 'body', detail: 'is not a plan' }]);
  if (subscription.state !== 'canceled') await moveCardSubscription(subscription, plan);
  await withPlatform(async () => {
    await putOnPlan(shopId, plan, {
      now: context.now,
      byUserId: context.userId,
      note: body.note,
    });
    await recordPlatform(context, 'plan of a shop changed', shopId, {
      plan: plan.name,
      note: body.note,
    });
  });
  return showShop(context, shopId);
}

/** While it is paused a shop is not billed: it gets nothing for it. */
export async function pauseShop(
  context: PlatformContext,
  shopId: string,
  note: string,
): Promise<ShopPage> {
  const { state } = await subscriptionOf(shopId);
  if (state === 'canceled') throw problem('conflict', 'The subscription of this shop has ended.');
  const { to } = await decide(context, shopId, 'paused', 'shop paused', note);
  if (to === 'paused') await stopBilling(shopId, true);
  return showShop(context, shopId);
}

export async function resumeShop(
  context: PlatformContext,
  shopId: string,
  note: string,
): Promise<ShopPage> {
  const { state } = await subscriptionOf(shopId);
  if (state === 'canceled') {
    throw problem('conflict', 'The subscription has ended: the shop chooses a plan to go on.');
  }
  const { to } = await decide(context, shopId, 'resumed', 'shop resumed', note);
  // What ended behind the pause is billed no more, and cannot be changed there.
  if (to !== 'canceled') await stopBilling(shopId, false);
  return showShop(context, shopId);
}

export async function cancelShop(
  context: PlatformContext,
  shopId: string,
  note: string,
): Promise<ShopPage> {
  await decide(context, shopId, 'ended', 'subscription ended', note);
  const { card_subscription: id } = await subscriptionOf(shopId);
  if (id) {
    await callCardService(async () => {
      const present = await stripe().subscriptions.retrieve(id);
      if (present.status !== 'canceled') await stripe().subscriptions.cancel(id);
    });
  }
  return showShop(context, shopId);
}

/** The change and the record of who made it are one write; a repeat changes and records nothing. */
function decide(
  context: PlatformContext,
  shopId: string,
  event: SubscriptionEvent,
  what: string,
  note: string,
): Promise<Change> {
  return withPlatform(async () => {
    const by = { event, now: context.now, note, byUserId: context.userId };
    const change = await changeState(shopId, by);
    const { from, to, changed } = change;
    if (changed) await recordPlatform(context, what, shopId, { from, to, note });
    return change;
  });
}

async function stopBilling(shopId: string, stop: boolean): Promise<void> {
  const { card_subscription: id } = await subscriptionOf(shopId);
  if (!id) return;
  await callCardService(() =>
    stripe().subscriptions.update(id, { pause_collection: stop ? { behavior: 'void' } : '' }),
  );
}
