import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  listOf,
  metadata,
  newId,
  retrieve,
  type Route,
  text,
  whole,
} from '../call';
import { invalid } from '../errors';

function chargeOf(call: Call): Thing {
  const intentId = text(call, 'payment_intent');
  if (!intentId) return find(call, 'charge', text(call, 'charge'));
  const intent = find(call, 'payment_intent', intentId);
  if (intent.status !== 'succeeded') {
    throw invalid('This PaymentIntent does not have a successful charge to refund.');
  }
  return find(call, 'charge', String(intent.latest_charge));
}

function create(call: Call): Thing {
  const charge = chargeOf(call);
  const left = Number(charge.amount_captured) - Number(charge.amount_refunded);
  if (charge.refunded || left === 0) {
    throw invalid(`Charge ${charge.id} has already been refunded.`, 'charge_already_refunded');
  }
  const amount = whole(call.params.amount, 'amount') ?? left;
  if (amount < 1) throw invalid('Invalid positive integer', 'parameter_invalid_integer', 'amount');
  if (amount > left) {
    throw invalid(
      `Refund amount (${amount}) is greater than unrefunded amount on charge (${left})`,
      undefined,
      'amount',
    );
  }
  const refund = call.books.put(call.account, {
    id: newId('re'),
    object: 'refund',
    created: call.now,
    amount,
    balance_transaction: null,
    charge: charge.id,
    currency: charge.currency,
    metadata: metadata(call.params.metadata),
    payment_intent: charge.payment_intent,
    reason: text(call, 'reason') ?? null,
    receipt_number: null,
    status: 'succeeded',
  });
  const refunded = change(call, charge, {
    amount_refunded: Number(charge.amount_refunded) + amount,
    refunded: amount === left,
  });
  call.emit('refund.created', refund);
  call.emit('charge.refunded', refunded);
  return refund;
}

function update(call: Call): Thing {
  const refund = find(call, 'refund', call.ids[0]);
  return change(call, refund, { metadata: metadata(call.params.metadata, refund.metadata) });
}

export const refundRoutes: Route[] = [
  ['POST', '/v1/refunds', create],
  ['GET', '/v1/refunds', listOf('refund', ['charge', 'payment_intent'])],
  ['GET', '/v1/refunds/:', retrieve('refund')],
  ['POST', '/v1/refunds/:', update],
];
