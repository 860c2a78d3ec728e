import { type Instant, instantText, toInstant } from '../calendar/iso';

/** What a shop's subscription to the platform is in (the names of payment processors' APIs). */
export type SubscriptionState = 'trialing' | 'active' | 'past_due' | 'paused' | 'canceled';

/**
 * What happens to a subscription. `grace_ended` comes from the sweep, `paused`, `resumed` and `ended`
 * from a platform admin, `resubscribed` when a shop takes a plan again; payments and `canceled` from
 * the processor.
 */
export type SubscriptionEvent =
  | 'trial_ended'
  | 'payment_succeeded'
  | 'payment_failed'
  | 'grace_ended'
  | 'paused'
  | 'resumed'
  | 'canceled'
  | 'ended'
  | 'resubscribed';

/**
 * Every state under every event, so that an event told twice, late or out of order has a defined
 * outcome: processors promise neither order nor single delivery.
 *
 * A paid bill opens a shop that was paused for want of payment, for that is what the owner pays for;
 * a platform admin's pause is `nextStanding`'s. Only taking a plan again opens a canceled one: a late
 * payment must not revive what somebody ended.
 */
const transitions: Record<SubscriptionState, Record<SubscriptionEvent, SubscriptionState>> = {
  trialing: {
    trial_ended: 'past_due',
    payment_succeeded: 'active',
    payment_failed: 'past_due',
    grace_ended: 'trialing',
    paused: 'paused',
    resumed: 'trialing',
    canceled: 'canceled',
    ended: 'canceled',
    resubscribed: 'active',
  },
  active: {
    trial_ended: 'active',
    payment_succeeded: 'active',
    payment_failed: 'past_due',
    grace_ended: 'active',
    paused: 'paused',
    resumed: 'active',
    canceled: 'canceled',
    ended: 'canceled',
    resubscribed: 'active',
  },
  past_due: {
    trial_ended: 'past_due',
    payment_succeeded: 'active',
    payment_failed: 'past_due',
    grace_ended: 'paused',
    paused: 'paused',
    resumed: 'past_due',
    canceled: 'canceled',
    ended: 'canceled',
    resubscribed: 'active',
  },
  paused: {
    trial_ended: 'paused',
    payment_succeeded: 'active',
    payment_failed: 'paused',
    grace_ended: 'paused',
    paused: 'paused',
    resumed: 'active',
    canceled: 'canceled',
    ended: 'canceled',
    resubscribed: 'active',
  },
  canceled: {
    trial_ended: 'canceled',
    payment_succeeded: 'canceled',
    payment_failed: 'canceled',
    grace_ended: 'canceled',
    paused: 'canceled',
    resumed: 'canceled',
    canceled: 'canceled',
    ended: 'canceled',
    resubscribed: 'active',
  },
};

/** The state after an event; the same state when the event changes nothing. */
export function nextState(state: SubscriptionState, event: SubscriptionEvent): SubscriptionState {
  return transitions[state][event];
}

/** A subscription with, while a platform admin holds it paused, the state it would be in otherwise. */
export interface Standing {
  state: SubscriptionState;
  heldFrom: SubscriptionState | null;
}

/**
 * How a subscription stands after an event. What an admin paused only an admin opens: meanwhile
 * payments, refusals and choices move the state behind the pause, to which the shop is resumed.
 */
export function nextStanding({ state, heldFrom }: Standing, event: SubscriptionEvent): Standing {
  if (event === 'paused' && state !== 'canceled') {
    return { state: 'paused', heldFrom: heldFrom ?? state };
  }
  const after = nextState(heldFrom ?? state, event);
  const letGo = event === 'resumed' || event === 'ended';
  return heldFrom === null || letGo
    ? { state: after, heldFrom: null }
    : { state: 'paused', heldFrom: after };
}

/**
 * The instant a past-due shop's grace ends: whole days of 24 hours after it fell past due.
 *
 * @param graceDays 0 or more
 * @throws RangeError for a malformed instant or grace
 */
export function graceEndsAt(since: Instant, graceDays: number): string {
  if (!Number.isInteger(graceDays) || graceDays < 0) {
    throw new RangeError(`Grace is a whole number of days, not ${graceDays}`);
  }
  return instantText(toInstant(since).add({ hours: graceDays * 24 }));
}

/**
 * Whether a shop may change anything. Reading and exporting are always allowed: a shop's records
 * are its own.
 *
 * @param since when the shop came into this state
 * @param graceDays days past due during which work goes on; at their end writing stops at once,
 *   whether or not the sweep has already paused the shop
 */
export function mayWrite(
  state: SubscriptionState,
  since: Instant,
  now: Instant,
  graceDays: number,
): boolean {
  if (state === 'paused' || state === 'canceled') return false;
  if (state !== 'past_due') return true;
  return instantText(toInstant(now)) < graceEndsAt(since, graceDays);
}
