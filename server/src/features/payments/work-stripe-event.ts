import type Stripe from 'stripe';
import { systemContext, type Context } from '../../core/context';
import { platformRow, platformRows } from '../../core/database/tenancy';
import { enqueueNow } from '../../core/jobs/boss';
import { type Job } from '../../core/jobs/work';
import { noteDispute, settleCardPayment } from './settle-card-payment';

/** What an event that belongs to the platform itself is worked by: the shops' own subscriptions. */
export type PlatformEventWork = (event: Stripe.Event) => Promise<void>;

interface StoredEvent {
  id: string;
  account: string | null;
  payload: Stripe.Event;
}

/** After so many tries an event is left for a person to look at. */
const mostTries = 20;

export function stripeEventJob(workPlatformEvent: PlatformEventWork): Job {
  return {
    queue: 'stripe-event',
    async work(data) {
      await workStripeEvent(String(data.eventId), new Date(), workPlatformEvent);
    },
  };
}

/** Works a stored event. Working it twice changes nothing, so it is noted as worked afterwards. */
async function workStripeEvent(
  eventId: string,
  now: Date,
  workPlatformEvent: PlatformEventWork,
): Promise<void> {
  const event = await platformRow<StoredEvent>(
    'select id, account, payload from stripe_events where id = $eventId and worked_at is null',
    { eventId },
  );
  if (!event) return;
  try {
    if (event.account === null) await workPlatformEvent(event.payload);
    else await workShopEvent(event.account, event.payload, now);
    await platformRows(
      `update stripe_events set worked_at = now(), attempts = attempts + 1, last_error = null
       where id = $eventId`,
      { eventId },
    );
  } catch (error) {
    await platformRows(
      'update stripe_events set attempts = attempts + 1, last_error = $words where id = $eventId',
      { eventId, words: (error instanceof Error ? error.message : String(error)).slice(0, 300) },
    );
    throw error;
  }
}

async function workShopEvent(account: string, event: Stripe.Event, now: Date): Promise<void> {
  const shop = await platformRow<{ id: string }>(
    'select id from shops where card_account = $account',
    { account },
  );
  // An account that is none of ours any more has nothing to tell us.
  if (!shop) return;
  await workEventOf(systemContext(shop.id, now, event.id), event);
}

async function workEventOf(context: Context, event: Stripe.Event): Promise<void> {
  switch (event.type) {
    case 'checkout.session.completed':
    case 'checkout.session.expired':
    case 'checkout.session.async_payment_succeeded':
    case 'checkout.session.async_payment_failed':
      await settleCardPayment(context, { session: event.data.object.id });
      return;
    case 'payment_intent.succeeded':
    case 'payment_intent.payment_failed':
    case 'payment_intent.canceled': {
      const id = event.data.object.metadata?.payment;
      if (id && idShape.test(id)) await settleCardPayment(context, { id });
      return;
    }
    case 'charge.refunded':
    case 'refund.created':
    case 'refund.updated': {
      const intent = idOf(event.data.object.payment_intent);
      if (intent) await settleCardPayment(context, { intent });
      return;
    }
    case 'charge.dispute.created':
    case 'charge.dispute.updated':
    case 'charge.dispute.closed': {
      const { id, amount, created, status, payment_intent } = event.data.object;
      const intent = idOf(payment_intent);
      if (intent) await noteDispute(context, { id, intent, amount, created, status });
    }
  }
}

const idShape = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

function idOf(reference: string | { id: string } | null | undefined): string | undefined {
  return typeof reference === 'string' ? reference : reference?.id;
}

/** For the sweep: events that were stored and, for whatever reason, not worked. */
export async function sweepStripeEvents(): Promise<void> {
  const waiting = await platformRows<{ id: string }>(
    `select id from stripe_events
     where worked_at is null and attempts < ${mostTries} and received_at < now() - interval '2 minutes'
     order by received_at limit 100`,
  );
  for (const { id } of waiting) await enqueueNow('stripe-event', { eventId: id });
}
