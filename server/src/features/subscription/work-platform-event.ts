import type Stripe from 'stripe';
import { followCardSubscription, followCheckout } from './follow-card-subscription';

/** Works an event of the platform's own account: what shops pay the platform by. */
export async function workPlatformEvent(event: Stripe.Event): Promise<void> {
  const now = new Date();
  switch (event.type) {
    case 'checkout.session.completed':
    case 'checkout.session.expired':
      return followCheckout(event.data.object.id, now);
    case 'customer.subscription.created':
    case 'customer.subscription.updated':
    case 'customer.subscription.deleted':
    case 'customer.subscription.paused':
    case 'customer.subscription.resumed':
      return followCardSubscription(event.data.object.id, now);
    case 'invoice.paid':
    case 'invoice.payment_failed': {
      const of = event.data.object.parent?.subscription_details?.subscription;
      const id = typeof of === 'string' ? of : of?.id;
      if (id) await followCardSubscription(id, now, event.type === 'invoice.paid');
    }
  }
}
