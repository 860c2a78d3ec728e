import express, { type RequestHandler } from 'express';
import type Stripe from 'stripe';
import { type Config } from '../../core/config';
import { platformRows, withPlatform } from '../../core/database/tenancy';
import { enqueueNow } from '../../core/jobs/boss';
import { type Log } from '../../core/logging';
import { stripe } from '../../core/payments/stripe';
import { problem } from '../../core/problems/problem';

/**
 * Where the card payment service tells what happened: the signature over the raw bytes is checked,
 * the event is stored by its id and answered, and only then worked. Anything that is not answered
 * with success comes again.
 */
export function stripeWebhook(config: Config, log: Log): RequestHandler[] {
  return [
    express.raw({ type: () => true, limit: '1mb' }),
    (request, response, next) => {
      const event = verified(request.body, request.get('stripe-signature'), config);
      if (!event) {
        log.warn('card payment event with a wrong signature');
        return next(problem('malformed-request', 'The signature does not fit.'));
      }
      store(event).then(() => response.status(200).json({ received: true }), next);
    },
  ];
}

function verified(
  body: unknown,
  signature: string | undefined,
  config: Config,
): Stripe.Event | undefined {
  // An unset secret would let anybody sign: then nothing is believed.
  if (!Buffer.isBuffer(body) || !signature || !config.card.webhookSecret) return undefined;
  try {
    return stripe().webhooks.constructEvent(body, signature, config.card.webhookSecret);
  } catch {
    return undefined;
  }
}

function store(event: Stripe.Event): Promise<void> {
  return withPlatform(async () => {
    const object = event.data.object as { id?: string };
    const stored = await platformRows<{ id: string }>(
      `insert into stripe_events (id, account, type, object_id, payload)
       values ($id, $account, $type, $objectId, $payload::jsonb)
       on conflict (id) do nothing returning id`,
      {
        id: event.id,
        account: event.account ?? null,
        type: event.type,
        objectId: object.id ?? null,
        payload: JSON.stringify(event),
      },
    );
    if (stored.length) await enqueueNow('stripe-event', { eventId: event.id });
  });
}
