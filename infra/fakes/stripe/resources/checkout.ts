import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  list,
  metadata,
  newId,
  paged,
  record,
  required,
  type Route,
  text,
  whole,
} from '../call';
import { type Params } from '../form';
import { invalid, missing } from '../errors';
import { makePrice } from './catalogue';
import { createCard, createCustomer } from './customers';
import { checkedAmount, openIntent, tryCard } from './payments';
import { startSubscription } from './subscriptions';

interface SessionLine {
  id: string;
  object: 'item';
  amount_subtotal: number;
  amount_total: number;
  currency: string;
  description: string;
  price: Thing;
  quantity: number;
}

function linesOf(call: Call): SessionLine[] {
  return list(call.params.line_items).map((entry) => {
    const item = record(entry);
    const data = record(item.price_data);
    const price =
      typeof item.price === 'string' ? find(call, 'price', item.price) : makePrice(call, data);
    const quantity = whole(item.quantity, 'line_items[quantity]') ?? 1;
    const amount = Number(price.unit_amount) * quantity;
    return {
      id: newId('li'),
      object: 'item',
      amount_subtotal: amount,
      amount_total: amount,
      currency: String(price.currency),
      description: String(find(call, 'product', String(price.product)).name),
      price,
      quantity,
    };
  });
}

function address(call: Call, name: string): string | undefined {
  const url = text(call, name);
  if (url !== undefined && !URL.canParse(url)) {
    throw invalid('Not a valid URL', 'url_invalid', name);
  }
  return url;
}

function create(call: Call): Thing {
  const mode = required(call, 'mode');
  if (!['payment', 'subscription', 'setup'].includes(mode)) {
    throw invalid(`Invalid mode: ${mode}`, undefined, 'mode');
  }
  const lines = linesOf(call);
  if (mode !== 'setup' && lines.length === 0) throw missing('line_items');
  const total = lines.reduce((sum, line) => sum + line.amount_total, 0);
  if (mode === 'payment') checkedAmount(total);
  const expires = whole(call.params.expires_at, 'expires_at') ?? call.now + 86_400;
  if (expires < call.now + 1_800 || expires > call.now + 86_400) {
    throw invalid(
      'The `expires_at` timestamp must be between 30 minutes and 24 hours from now.',
      undefined,
      'expires_at',
    );
  }
  const success = address(call, 'success_url');
  if (!success) throw missing('success_url');
  const customer = text(call, 'customer');
  const id = newId('cs_test');
  return call.books.put(call.account, {
    id,
    object: 'checkout.session',
    created: call.now,
    livemode: false,
    amount_subtotal: mode === 'setup' ? null : total,
    amount_total: mode === 'setup' ? null : total,
    cancel_url: address(call, 'cancel_url') ?? null,
    client_reference_id: text(call, 'client_reference_id') ?? null,
    currency: lines[0]?.currency ?? text(call, 'currency') ?? null,
    customer: customer ? find(call, 'customer', customer).id : null,
    customer_details: null,
    customer_email: text(call, 'customer_email') ?? null,
    expires_at: expires,
    invoice: null,
    metadata: metadata(call.params.metadata),
    mode,
    payment_intent: null,
    payment_method_types: ['card'],
    payment_status: mode === 'setup' ? 'no_payment_required' : 'unpaid',
    setup_intent: null,
    status: 'open',
    subscription: null,
    success_url: success,
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: text(call, 'ui_mode') ?? 'hosted_page',
    url: `${call.url}/checkout/${call.account || 'platform'}/${id}`,
    _lines: lines,
    _intent: record(call.params.payment_intent_data),
    _subscription: record(call.params.subscription_data),
  });
}

export function sessionLines(session: Thing): SessionLine[] {
  return session._lines as SessionLine[];
}

/** An open session whose time is over has expired, whenever that is noticed. */
export function current(call: Call, id: string | undefined): Thing {
  const session = find(call, 'checkout.session', id);
  const over = session.status === 'open' && Number(session.expires_at) <= call.now;
  return over ? expired(call, session) : session;
}

function expired(call: Call, session: Thing): Thing {
  const done = change(call, session, { status: 'expired', url: null });
  call.emit('checkout.session.expired', done);
  return done;
}

function expire(call: Call): Thing {
  const session = current(call, call.ids[0]);
  if (session.status !== 'open') {
    throw invalid(
      'Only Checkout Sessions with a status in ["open"] can be expired. ' +
        `This Checkout Session has a status of ${session.status}.`,
    );
  }
  return expired(call, session);
}

export interface CardEntry {
  number: string;
  month: number;
  year: number;
  name: string;
  email: string;
}

/** What the card page does: the session as it then stands; `refusal` when the card was declined. */
export function payWithCard(
  call: Call,
  session: Thing,
  entry: CardEntry,
): { session: Thing; refusal?: string } {
  const method = createCard(call, entry.number, entry.month, entry.year);
  const named = change(call, method, {
    billing_details: {
      ...(method.billing_details as object),
      name: entry.name,
      email: entry.email,
    },
  });
  return session.mode === 'payment'
    ? payOnce(call, session, named, entry)
    : keepCard(call, session, named, entry);
}

function payOnce(call: Call, session: Thing, method: Thing, entry: CardEntry) {
  const data = session._intent as Params;
  const begun = session.payment_intent as string | null;
  const intent = begun
    ? find(call, 'payment_intent', begun)
    : openIntent(call, {
        amount: Number(session.amount_total),
        currency: String(session.currency),
        customer: session.customer as string | null,
        description: (data.description as string | undefined) ?? null,
        metadata: metadata(data.metadata),
        applicationFee: whole(data.application_fee_amount, 'application_fee_amount'),
        receiptEmail: (data.receipt_email as string | undefined) ?? null,
        captureMethod: data.capture_method as string | undefined,
      });
  const tried = tryCard(call, intent, method);
  const followed = change(call, session, { payment_intent: intent.id });
  const error = tried.last_payment_error as { message: string } | null;
  if (error) return { session: followed, refusal: error.message };
  return { session: complete(call, followed, entry, { payment_status: 'paid' }) };
}

function keepCard(call: Call, session: Thing, method: Thing, entry: CardEntry) {
  const email = entry.email || String(session.customer_email ?? '');
  const customer = session.customer
    ? find(call, 'customer', String(session.customer))
    : createCustomer({ ...call, params: { email, name: entry.name } });
  const attached = change(call, method, { customer: customer.id });
  const settings = customer.invoice_settings as object;
  change(call, customer, {
    invoice_settings: { ...settings, default_payment_method: attached.id },
  });
  const refusal = method._refusal as { message: string } | undefined;
  if (session.mode === 'setup' || refusal) {
    if (refusal) return { session, refusal: refusal.message };
    return { session: complete(call, session, entry, { customer: customer.id }) };
  }
  const subscription = startSubscription(call, customer, {
    ...(session._subscription as Params),
    default_payment_method: attached.id,
    items: sessionLines(session).map((line) => ({
      price: line.price.id,
      quantity: String(line.quantity),
    })),
  });
  const changes = {
    customer: customer.id,
    subscription: subscription.id,
    invoice: subscription.latest_invoice,
    payment_status: subscription.status === 'trialing' ? 'no_payment_required' : 'paid',
  };
  return { session: complete(call, session, entry, changes) };
}

function complete(
  call: Call,
  session: Thing,
  entry: CardEntry,
  changes: Record<string, unknown>,
): Thing {
  const done = change(call, session, {
    ...changes,
    status: 'complete',
    url: null,
    customer_details: {
      address: null,
      email: entry.email || session.customer_email,
      name: entry.name,
      phone: null,
      tax_exempt: 'none',
      tax_ids: [],
    },
  });
  call.emit('checkout.session.completed', done);
  return done;
}

function listed(call: Call): Record<string, unknown> {
  const all = call.books
    .all(call.account, 'checkout.session')
    .map((session) => current(call, session.id));
  return paged(call, all, ['customer', 'payment_intent', 'subscription', 'status']);
}

export const checkoutRoutes: Route[] = [
  ['POST', '/v1/checkout/sessions', create],
  ['GET', '/v1/checkout/sessions', listed],
  ['GET', '/v1/checkout/sessions/:', (call) => current(call, call.ids[0])],
  ['POST', '/v1/checkout/sessions/:/expire', expire],
  [
    'GET',
    '/v1/checkout/sessions/:/line_items',
    (call) => ({
      object: 'list',
      data: sessionLines(find(call, 'checkout.session', call.ids[0])),
      has_more: false,
      url: '',
    }),
  ],
];
