import { type SubscriptionEvent } from '@lib/domain';
import { platformRows, withPlatform } from '../../core/database/tenancy';
import { type Log } from '../../core/logging';
import { changeState, mailOwners } from './change-state';
import { askAfterPayment } from './follow-card-subscription';

const most = 500;

/** For the sweep: what time alone does to subscriptions, and what nobody told us of. */
export async function sweepSubscriptions(now: Date, log: Log): Promise<void> {
  await happenTo(endedTrials, 'trial_ended', now);
  await happenTo(endedGrace, 'grace_ended', now);
  await remindOfTrials(now);
  await askAfterUnheard(now, log);
}

const endedTrials = `select shop_id from subscriptions
  where state = 'trialing' and trial_ends_at <= $now order by trial_ends_at limit ${most}`;

const endedGrace = `select b.shop_id from subscriptions b join plans p on p.id = b.plan_id
  where b.state = 'past_due' and b.state_since + make_interval(hours => 24 * p.grace_days) <= $now
  order by b.state_since limit ${most}`;

async function happenTo(due: string, event: SubscriptionEvent, now: Date): Promise<void> {
  for (const { shop_id } of await platformRows<{ shop_id: string }>(due, { now })) {
    await changeState(shop_id, { event, now });
  }
}

async function remindOfTrials(now: Date): Promise<void> {
  const ending = await platformRows<{ shop_id: string; day: string }>(
    `select b.shop_id, to_char(b.trial_ends_at at time zone s.zone, 'YYYY-MM-DD') as day
     from subscriptions b join shops s on s.id = b.shop_id
     where b.state = 'trialing' and b.trial_ends_at between $now and $now::timestamptz + interval '3 days'
       and not exists (select 1 from platform_mails m
         where m.dedupe_key like 'subscription:' || b.shop_id || ':%:trial_ending')
     limit ${most}`,
    { now },
  );
  for (const { shop_id, day } of ending) {
    const words =
      `The trial ends on ${day}. Choose a plan by then to go on as before; the shop works on for ` +
      'some days after that, and nothing is ever lost.';
    await withPlatform(() => mailOwners(shop_id, words, 'trial_ending'));
  }
}

/** Card pages whose end, and paid periods whose next bill, no event told us of. */
async function askAfterUnheard(now: Date, log: Log): Promise<void> {
  const unheard = await platformRows<{ shop_id: string }>(
    `select shop_id from subscriptions
     where (card_checkout is not null
         or (state in ('active', 'past_due') and card_subscription is not null
             and current_period_ends_at < $now::timestamptz - interval '1 hour'))
       and (card_checked_at is null or card_checked_at < $now::timestamptz - interval '15 minutes')
     limit 50`,
    { now },
  );
  for (const { shop_id } of unheard) {
    await platformRows('update subscriptions set card_checked_at = $now where shop_id = $shop_id', {
      shop_id,
      now,
    });
    try {
      await askAfterPayment(shop_id, now);
    } catch (error) {
      log.warn({ err: error, shopId: shop_id }, 'a subscription could not be asked after');
    }
  }
}
