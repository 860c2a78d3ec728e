import { nextState, type SubscriptionEvent, type SubscriptionState } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';

export interface Happened {
  event: SubscriptionEvent;
  now: Date;
  note?: string;
  byUserId?: string | null;
}

/**
 * Takes a shop's subscription through what happened, writes it into its history, and tells the
 * owners when it changed anything for them. An event that changes nothing leaves no trace.
 */
export function changeState(shopId: string, happened: Happened): Promise<SubscriptionState> {
  return withPlatform(async () => {
    const before = found(
      await platformRow<{ state: SubscriptionState }>(
        'select state from subscriptions where shop_id = $shopId for update',
        { shopId },
      ),
    ).state;
    const after = nextState(before, happened.event);
    if (after === before) return before;
    await platformRows(
      'update subscriptions set state = $after, state_since = $now where shop_id = $shopId',
      { shopId, after, now: happened.now },
    );
    await noteEvent(shopId, { ...happened, from: before, to: after });
    await tellOwners(shopId, after, `${happened.event}:${happened.now.toISOString()}`);
    return after;
  });
}

/** Writes into a subscription's history also what changes no state: another plan, say. */
export async function noteEvent(
  shopId: string,
  noted: {
    event: string;
    now: Date;
    from?: SubscriptionState;
    to?: SubscriptionState;
    note?: string;
    byUserId?: string | null;
  },
): Promise<void> {
  await platformRows(
    `insert into subscription_events
       (shop_id, id, at, event, from_state, to_state, note, by_user_id)
     values ($shopId, $id, $now, $event, $from, $to, $note, $byUserId)`,
    {
      shopId,
      id: uuid(),
      now: noted.now,
      event: noted.event,
      from: noted.from ?? null,
      to: noted.to ?? null,
      note: noted.note ?? '',
      byUserId: noted.byUserId ?? null,
    },
  );
}

const told: Record<Exclude<SubscriptionState, 'trialing'>, string> = {
  active: 'The subscription is paid and active. Everything works.',
  past_due:
    'The subscription is not paid. The shop works on for some days; please choose a plan or see to ' +
    'the card before they are over.',
  paused:
    'The shop is paused: everything can be read and exported, nothing can be written. Paying the ' +
    'subscription opens it again.',
  canceled:
    'The subscription has ended. Everything can still be read and exported, and a plan can be chosen ' +
    'again at any time.',
};

async function tellOwners(shopId: string, state: SubscriptionState, key: string): Promise<void> {
  if (state !== 'trialing') await mailOwners(shopId, told[state], key);
}

/** One mail to each owner; the same key twice is one mail. */
export async function mailOwners(shopId: string, words: string, key: string): Promise<void> {
  const owners = await platformRows<{ id: string; name: string; email: string; shop: string }>(
    `select m.id, m.name, m.email, s.name as shop
     from memberships m join shops s on s.id = m.shop_id
     where m.shop_id = $shopId and m.role = 'shop_owner' and m.ended_at is null`,
    { shopId },
  );
  for (const owner of owners) {
    await queuePlatformMail({
      to: owner.email,
      template: 'subscription_changed',
      params: { name: owner.name, shopName: owner.shop, words },
      dedupeKey: `subscription:${shopId}:${owner.id}:${key}`,
      shopId,
    });
  }
}
