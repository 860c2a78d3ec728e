import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  flag,
  listOf,
  metadata,
  newId,
  required,
  retrieve,
  type Route,
  text,
  whole,
} from '../call';
import { type TestCard } from '../cards';
import { ApiError, invalid } from '../errors';
import { usableMethod } from './customers';

export interface Wanted {
  amount: number;
  currency: string;
  customer?: string | null;
  description?: string | null;
  metadata?: Record<string, string>;
  applicationFee?: number | null;
  receiptEmail?: string | null;
  captureMethod?: string;
}

const smallest = 50;

export function checkedAmount(value: number | undefined): number {
  if (value === undefined) throw invalid('Missing required param: amount.', 'parameter_missing');
  if (value < smallest) {
    throw invalid(`Amount must be at least ${smallest}.`, 'amount_too_small', 'amount');
  }
  if (value > 99_999_999) {
    throw invalid('Amount must be no more than 999,999.99.', 'amount_too_large', 'amount');
  }
  return value;
}

export function checkedCurrency(value: string): string {
  if (!/^[a-z]{3}$/i.test(value)) {
    throw invalid(`Invalid currency: ${value}.`, 'invalid_currency', 'currency');
  }
  return value.toLowerCase();
}

export function openIntent(call: Call, wanted: Wanted): Thing {
  const id = newId('pi');
  const intent = call.books.put(call.account, {
    id,
    object: 'payment_intent',
    created: call.now,
    livemode: false,
    amount: wanted.amount,
    amount_received: 0,
    amount_capturable: 0,
    application_fee_amount: wanted.applicationFee ?? null,
    automatic_payment_methods: { enabled: true, allow_redirects: 'always' },
    canceled_at: null,
    cancellation_reason: null,
    capture_method: wanted.captureMethod ?? 'automatic',
    client_secret: `${id}_secret_${newId('x').slice(2)}`,
    confirmation_method: 'automatic',
    currency: wanted.currency,
    customer: wanted.customer ?? null,
    description: wanted.description ?? null,
    last_payment_error: null,
    latest_charge: null,
    metadata: wanted.metadata ?? {},
    next_action: null,
    payment_method: null,
    payment_method_types: ['card'],
    receipt_email: wanted.receiptEmail ?? null,
    statement_descriptor: null,
    status: 'requires_payment_method',
  });
  call.emit('payment_intent.created', intent);
  return intent;
}

function charge(call: Call, intent: Thing, method: Thing, refusal: TestCard['refusal']): Thing {
  const captured = !refusal && intent.capture_method !== 'manual';
  const made = call.books.put(call.account, {
    id: newId('ch'),
    object: 'charge',
    created: call.now,
    livemode: false,
    amount: intent.amount,
    amount_captured: captured ? intent.amount : 0,
    amount_refunded: 0,
    application_fee_amount: intent.application_fee_amount,
    balance_transaction: null,
    billing_details: method.billing_details,
    captured,
    currency: intent.currency,
    customer: intent.customer,
    description: intent.description,
    disputed: false,
    failure_code: refusal?.code ?? null,
    failure_message: refusal?.message ?? null,
    metadata: intent.metadata,
    outcome: {
      network_status: refusal ? 'declined_by_network' : 'approved_by_network',
      reason: refusal?.decline_code ?? null,
      type: refusal ? 'issuer_declined' : 'authorized',
    },
    paid: !refusal,
    payment_intent: intent.id,
    payment_method: method.id,
    payment_method_details: { type: 'card', card: method.card },
    receipt_email: intent.receipt_email,
    receipt_url: null,
    refunded: false,
    status: refusal ? 'failed' : 'succeeded',
  });
  return captured ? change(call, made, { balance_transaction: settle(call, made).id }) : made;
}

/** What reaches the balance: the usual fee of a card payment is kept back. */
function settle(call: Call, source: Thing): Thing {
  const amount = Number(source.amount);
  const fee = Math.round(amount * 0.029) + 30 + Number(source.application_fee_amount ?? 0);
  return call.books.put(call.account, {
    id: newId('txn'),
    object: 'balance_transaction',
    created: call.now,
    amount,
    currency: source.currency,
    fee,
    net: amount - fee,
    source: source.id,
    status: 'pending',
    type: 'charge',
  });
}

/** Tries the card. The intent as it then stands; `last_payment_error` tells a refusal. */
export function tryCard(call: Call, intent: Thing, method: Thing): Thing {
  const refusal = method._refusal as TestCard['refusal'];
  const attempt = charge(call, intent, method, refusal);
  if (refusal) {
    const failed = change(call, intent, {
      status: 'requires_payment_method',
      payment_method: null,
      latest_charge: attempt.id,
      last_payment_error: {
        type: 'card_error',
        ...refusal,
        charge: attempt.id,
        payment_method: shown(method),
      },
    });
    call.emit('charge.failed', attempt);
    call.emit('payment_intent.payment_failed', failed);
    return failed;
  }
  const held = intent.capture_method === 'manual';
  const paid = change(call, intent, {
    status: held ? 'requires_capture' : 'succeeded',
    amount_received: held ? 0 : intent.amount,
    amount_capturable: held ? intent.amount : 0,
    payment_method: method.id,
    latest_charge: attempt.id,
    last_payment_error: null,
  });
  call.emit('charge.succeeded', attempt);
  call.emit(held ? 'payment_intent.amount_capturable_updated' : 'payment_intent.succeeded', paid);
  return paid;
}

function shown(thing: Thing): Record<string, unknown> {
  return Object.fromEntries(Object.entries(thing).filter(([name]) => !name.startsWith('_')));
}

export function cardError(intent: Thing): ApiError {
  return new ApiError(402, {
    ...(intent.last_payment_error as Record<string, unknown>),
    type: 'card_error',
    payment_intent: shown(intent),
  });
}

function create(call: Call): Thing {
  const customer = text(call, 'customer');
  const method = text(call, 'payment_method');
  const intent = openIntent(call, {
    amount: checkedAmount(whole(call.params.amount, 'amount')),
    currency: checkedCurrency(required(call, 'currency')),
    customer: customer && find(call, 'customer', customer).id,
    description: text(call, 'description'),
    metadata: metadata(call.params.metadata),
    applicationFee: whole(call.params.application_fee_amount, 'application_fee_amount'),
    receiptEmail: text(call, 'receipt_email'),
    captureMethod: text(call, 'capture_method'),
  });
  const withMethod = method
    ? change(call, intent, {
        payment_method: usableMethod(call, method).id,
        status: 'requires_confirmation',
      })
    : intent;
  return flag(call.params.confirm) ? confirmed(call, withMethod) : withMethod;
}

function confirmed(call: Call, intent: Thing): Thing {
  if (['succeeded', 'canceled', 'requires_capture'].includes(String(intent.status))) {
    throw unexpected(intent, 'confirm');
  }
  const wanted = text(call, 'payment_method') ?? (intent.payment_method as string | null);
  if (!wanted) {
    throw invalid(
      'You cannot confirm this PaymentIntent because it is missing a payment method.',
      'payment_intent_unexpected_state',
    );
  }
  const tried = tryCard(call, intent, usableMethod(call, wanted));
  if (tried.last_payment_error) throw cardError(tried);
  return tried;
}

function unexpected(intent: Thing, verb: string): ApiError {
  return new ApiError(400, {
    type: 'invalid_request_error',
    code: 'payment_intent_unexpected_state',
    message: `You cannot ${verb} this PaymentIntent because it has a status of ${intent.status}.`,
    payment_intent: shown(intent),
  });
}

function capture(call: Call): Thing {
  const intent = find(call, 'payment_intent', call.ids[0]);
  if (intent.status !== 'requires_capture') throw unexpected(intent, 'capture');
  const held = find(call, 'charge', String(intent.latest_charge));
  const amount = whole(call.params.amount_to_capture, 'amount_to_capture') ?? intent.amount;
  const captured = change(call, held, { captured: true, amount_captured: amount });
  call.emit('charge.captured', captured);
  const done = change(call, intent, {
    status: 'succeeded',
    amount_received: amount,
    amount_capturable: 0,
  });
  call.emit('payment_intent.succeeded', done);
  return done;
}

function cancelIntent(call: Call, intent: Thing, reason: string | null): Thing {
  if (['succeeded', 'canceled'].includes(String(intent.status))) throw unexpected(intent, 'cancel');
  const done = change(call, intent, {
    status: 'canceled',
    canceled_at: call.now,
    cancellation_reason: reason,
  });
  call.emit('payment_intent.canceled', done);
  return done;
}

function update(call: Call): Thing {
  const intent = find(call, 'payment_intent', call.ids[0]);
  const amount = whole(call.params.amount, 'amount');
  if (amount !== undefined && ['succeeded', 'canceled'].includes(String(intent.status))) {
    throw unexpected(intent, 'update');
  }
  return change(call, intent, {
    amount: amount === undefined ? intent.amount : checkedAmount(amount),
    description: text(call, 'description') ?? intent.description,
    metadata: metadata(call.params.metadata, intent.metadata),
  });
}

export const paymentRoutes: Route[] = [
  ['POST', '/v1/payment_intents', create],
  ['GET', '/v1/payment_intents', listOf('payment_intent', ['customer'])],
  ['GET', '/v1/payment_intents/:', retrieve('payment_intent')],
  ['POST', '/v1/payment_intents/:', update],
  [
    'POST',
    '/v1/payment_intents/:/confirm',
    (call) => confirmed(call, find(call, 'payment_intent', call.ids[0])),
  ],
  ['POST', '/v1/payment_intents/:/capture', capture],
  [
    'POST',
    '/v1/payment_intents/:/cancel',
    (call) =>
      cancelIntent(
        call,
        find(call, 'payment_intent', call.ids[0]),
        text(call, 'cancellation_reason') ?? null,
      ),
  ],
  ['GET', '/v1/charges', listOf('charge', ['customer', 'payment_intent'])],
  ['GET', '/v1/charges/:', retrieve('charge')],
  ['GET', '/v1/balance_transactions', listOf('balance_transaction', ['source', 'type'])],
  ['GET', '/v1/balance_transactions/:', retrieve('balance_transaction')],
];
