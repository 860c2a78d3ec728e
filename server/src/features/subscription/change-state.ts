import {
  nextStanding,
  type Standing,
  type SubscriptionEvent,
  type SubscriptionState,
} from '@lib/domain';
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

export interface Change {
  from: SubscriptionState;
  to: SubscriptionState;
  /** Also when the state is the same, but a platform admin holds the shop now. */
  changed: boolean;
}

/**
 * Takes a shop's subscription through what happened, writes it into its history, and tells the
 * owners when it changed anything for them. An event that changes nothing leaves no trace.
 */
export function changeState(shopId: string, happened: Happened): Promise<Change> {
  return withPlatform(async () => {
    const before = found(
      await platformRow<Standing>(
        `select state, held_from as "heldFrom" from subscriptions
         where shop_id = $shopId for update`,
        { shopId },
      ),
    );
    const after = nextStanding(before, happened.event);
    const held = after.heldFrom !== null;
    const moved = after.state !== before.state;
    const changed = moved || after.heldFrom !== before.heldFrom;
    const change = { from: before.state, to: after.state, changed };
    if (!changed) return change;
    await platformRows(
      `update subscriptions set state = $state, held_from = $heldFrom,
         state_since = case when state = $state then state_since else $now::timestamptz end
       where shop_id = $shopId`,
      { shopId, ...after, now: happened.now },
    );
    await noteEvent(shopId, { ...happened, ...change });
    if (moved || held !== (before.heldFrom !== null)) {
      const key = `${happened.event}:${happened.now.toISOString()}`;
      await tellOwners(shopId, held ? 'held' : after.state, key);
    }
    return change;
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

type Told = SubscriptionState | 'held';

const told: Record<Told, string> = {
  trialing: 'The shop is open again and its trial goes on. Everything works.',
  active: 'The subscription is paid and active. Everything works.',
  past_due:
    'The subscription is not paid. The shop works on for some days; please choose a plan or see to ' +
    'the card before they are over.',
  paused:
    'The shop is paused: everything can be read and exported, nothing can be written. Paying the ' +
    'subscription opens it again.',
  held:
    'The shop was paused by the platform: everything can be read and exported, nothing can be ' +
    'written, and nothing is billed. Only the platform opens it again; please write to us.',
  canceled:
    'The subscription has ended. Everything can still be read and exported, and a plan can be chosen ' +
    'again at any time.',
};

function tellOwners(shopId: string, what: Told, key: string): Promise<void> {
  return mailOwners(shopId, told[what], key);
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
