import {
  type CountedThing,
  type Counts,
  graceEndsAt,
  limitsNotice,
  mayWrite,
  type SubscriptionState,
} from '@lib/domain';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

export interface SubscriptionRow {
  shop_id: string;
  state: SubscriptionState;
  state_since: Date;
  /** While a platform admin holds the shop paused: the state behind the pause. */
  held_from: SubscriptionState | null;
  trial_ends_at: Date | null;
  current_period_ends_at: Date | null;
  card_customer: string | null;
  card_subscription: string | null;
  card_checkout: string | null;
  version: number;
}

export const subscriptionColumns = `b.shop_id, b.state, b.state_since, b.held_from, b.trial_ends_at,
  b.current_period_ends_at, b.card_customer, b.card_subscription, b.card_checkout, b.version`;

export interface PlanRow {
  id: string;
  code: string;
  name: string;
  monthly_amount: number;
  currency: string;
  store_limit: number;
  machine_limit: number;
  crew_limit: number;
  trial_days: number;
  grace_days: number;
  offered: boolean;
  card_price: string | null;
  version: number;
}

export const planColumns = `p.id, p.code, p.name, p.monthly_amount, p.currency, p.store_limit,
  p.machine_limit, p.crew_limit, p.trial_days, p.grace_days, p.offered, p.card_price, p.version`;

export interface EventRow {
  id: string;
  at: Date;
  event: string;
  from_state: SubscriptionState | null;
  to_state: SubscriptionState | null;
  note: string | null;
}

export const newestEvents = `select id, at, event, from_state, to_state, note
  from subscription_events where shop_id = $shopId order by at desc, id desc limit 20`;

type Shown = AnswerOf<'subscription.show'>;

export function presentPlan(plan: PlanRow): Shown['plan'] {
  return {
    id: plan.id,
    code: plan.code,
    name: plan.name,
    monthlyAmount: plan.monthly_amount,
    currency: plan.currency,
    storeLimit: plan.store_limit,
    machineLimit: plan.machine_limit,
    crewLimit: plan.crew_limit,
    trialDays: plan.trial_days,
    graceDays: plan.grace_days,
    offered: plan.offered,
    version: plan.version,
  };
}

export function presentUsage(plan: PlanRow, used: Counts): Shown['usage'] {
  const limits: Counts = {
    stores: plan.store_limit,
    machines: plan.machine_limit,
    crew: plan.crew_limit,
  };
  return limitsNotice(limits, used).map((notice) => ({
    kind: notice.counted satisfies CountedThing,
    used: notice.used,
    limit: notice.allowed,
    level: notice.level,
    words: notice.words,
  }));
}

export function presentEvent(event: EventRow): Shown['events'][number] {
  return {
    id: event.id,
    at: event.at.toISOString(),
    event: event.event,
    fromState: event.from_state,
    toState: event.to_state,
    note: event.note ?? '',
  };
}

/** How a subscription stands: the same for the shop and for the platform area. */
export function presentStanding(subscription: SubscriptionRow, plan: PlanRow, now: Date) {
  const { state, state_since } = subscription;
  return {
    state,
    stateSince: state_since.toISOString(),
    pausedByPlatform: subscription.held_from !== null,
    trialEndsAt: instantOrNull(subscription.trial_ends_at),
    graceEndsAt: state === 'past_due' ? graceEndsAt(state_since, plan.grace_days) : null,
    paidUntil: instantOrNull(subscription.current_period_ends_at),
    mayWrite: mayWrite(state, state_since, now, plan.grace_days),
  };
}
