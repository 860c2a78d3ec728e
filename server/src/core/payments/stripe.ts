import Stripe from 'stripe';
import { type Config } from '../config';

let client: Stripe | undefined;

/** The card payment service through its own SDK; a base address points it at the local fake. */
export function openStripe(card: Config['card']): void {
  const base = card.apiBase ? new URL(card.apiBase) : undefined;
  client = new Stripe(card.secretKey || 'sk_test_none', {
    maxNetworkRetries: 2,
    timeout: 15_000,
    telemetry: false,
    ...(base
      ? {
          host: base.hostname,
          port: base.port,
          protocol: base.protocol.replace(':', '') as 'http' | 'https',
        }
      : {}),
  });
}

export function stripe(): Stripe {
  if (!client) throw new Error('Card payments are not open: call openStripe first.');
  return client;
}
