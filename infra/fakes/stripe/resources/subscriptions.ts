import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  flag,
  list,
  metadata,
  newId,
  paged,
  record,
  required,
  retrieve,
  type Route,
  text,
  whole,
} from '../call';
import { type Params } from '../form';
import { invalid, missing, noSuch } from '../errors';
import { makePrice } from './catalogue';
import { usableMethod } from './customers';
import { collect, defaultMethod, type Line, openInvoice } from './invoices';
import { cardError } from './payments';

export interface Item {
  id: string;
  object: 'subscription_item';
  price: Thing;
  quantity: number;
  subscription: string;
  current_period_start: number;
  current_period_end: number;
  metadata: Record<string, string>;
  created: number;
}

function itemsOf(subscription: Thing): Item[] {
  return (subscription.items as { data: Item[] }).data;
}

/** The same day of a later month, or its last when the month is shorter. */
export function later(from: number, interval: string, count: number): number {
  const date = new Date(from * 1000);
  if (interval === 'day' || interval === 'week') {
    return from + count * (interval === 'week' ? 7 : 1) * 86_400;
  }
  const months = count * (interval === 'year' ? 12 : 1);
  const day = date.getUTCDate();
  date.setUTCDate(1);
  date.setUTCMonth(date.getUTCMonth() + months + 1, 0);
  date.setUTCDate(Math.min(day, date.getUTCDate()));
  return Math.floor(date.getTime() / 1000);
}

function periodEnd(price: Thing, start: number): number {
  const recurring = price.recurring as { interval: string; interval_count: number } | null;
  if (!recurring) throw invalid('The price must be recurring.', undefined, 'items[0][price]');
  return later(start, recurring.interval, recurring.interval_count);
}

function makeItems(call: Call, subscription: string, params: readonly Params[]): Item[] {
  return params.map((entry) => {
    const price =
      typeof entry.price === 'string'
        ? find(call, 'price', entry.price)
        : makePrice(call, record(entry.price_data));
    return {
      id: newId('si'),
      object: 'subscription_item',
      created: call.now,
      price,
      quantity: whole(entry.quantity, 'quantity') ?? 1,
      subscription,
      current_period_start: call.now,
      current_period_end: periodEnd(price, call.now),
      metadata: {},
    };
  });
}

function itemList(subscription: string, data: readonly Item[]): Record<string, unknown> {
  const url = `/v1/subscription_items?subscription=${subscription}`;
  return { object: 'list', data, has_more: false, url };
}

function linesOf(items: readonly Item[]): Line[] {
  return items.map((item) => ({
    amount: Number(item.price.unit_amount) * item.quantity,
    description: `${item.quantity} x ${item.price.nickname ?? item.price.product}`,
    price: item.price.id,
    quantity: item.quantity,
    period: { start: item.current_period_start, end: item.current_period_end },
  }));
}

function trialEnd(call: Call, params: Params): number | null {
  const days = whole(params.trial_period_days, 'trial_period_days');
  if (days) return call.now + days * 86_400;
  if (params.trial_end === 'now') return null;
  return whole(params.trial_end, 'trial_end') ?? null;
}

/** Makes a subscription from parameters of its own request or of a Checkout session. */
export function startSubscription(call: Call, customer: Thing, params: Params): Thing {
  const entries = list(params.items).map(record);
  if (entries.length === 0) throw missing('items');
  const id = newId('sub');
  const trial = trialEnd(call, params);
  const items = makeItems(call, id, entries).map((item) =>
    trial ? { ...item, current_period_end: trial } : item,
  );
  const chosen = params.default_payment_method;
  const subscription = call.books.put(call.account, {
    id,
    object: 'subscription',
    created: call.now,
    livemode: false,
    billing_cycle_anchor: trial ?? call.now,
    cancel_at: null,
    cancel_at_period_end: flag(params.cancel_at_period_end),
    canceled_at: null,
    collection_method: params.collection_method ?? 'charge_automatically',
    currency: items[0]?.price.currency,
    customer: customer.id,
    days_until_due: whole(params.days_until_due, 'days_until_due') ?? null,
    default_payment_method: typeof chosen === 'string' ? usableMethod(call, chosen).id : null,
    description: params.description ?? null,
    ended_at: null,
    items: itemList(id, items),
    latest_invoice: null,
    metadata: metadata(params.metadata),
    pause_collection: null,
    start_date: call.now,
    status: trial ? 'trialing' : 'incomplete',
    trial_start: trial ? call.now : null,
    trial_end: trial,
    trial_settings: {
      end_behavior: {
        missing_payment_method: 'create_invoice',
        ...record(record(params.trial_settings).end_behavior),
      },
    },
  });
  call.emit('customer.subscription.created', subscription);
  return trial ? subscription : bill(call, subscription, 'subscription_create');
}

/** Invoices the current period, collects, and sets the status by what came of it. */
function bill(call: Call, subscription: Thing, reason: string): Thing {
  const invoice = openInvoice(call, subscription, linesOf(itemsOf(subscription)), reason);
  const invoiced = change(call, subscription, { latest_invoice: invoice.id });
  if (invoiced.collection_method === 'send_invoice' || invoice.status === 'paid') {
    return setStatus(call, invoiced, 'active');
  }
  const method = defaultMethod(call, String(invoiced.customer), invoiced.default_payment_method);
  if (!method && reason === 'subscription_create' && !leavesIncomplete(call)) {
    throw invalid(
      'This customer has no attached payment source or default payment method.',
      'resource_missing',
    );
  }
  if (!method) {
    call.emit('invoice.payment_failed', invoice);
    return setStatus(call, invoiced, unpaidStatus(reason));
  }
  const { invoice: tried, intent } = collect(call, invoice, method);
  if (tried.status === 'paid') return setStatus(call, invoiced, 'active');
  if (text(call, 'payment_behavior') === 'error_if_incomplete') throw cardError(intent);
  return setStatus(call, invoiced, unpaidStatus(reason));
}

function leavesIncomplete(call: Call): boolean {
  return text(call, 'payment_behavior') === 'default_incomplete';
}

function unpaidStatus(reason: string): string {
  return reason === 'subscription_create' ? 'incomplete' : 'past_due';
}

function setStatus(call: Call, subscription: Thing, status: string): Thing {
  if (subscription.status === status) return subscription;
  const changed = change(call, subscription, { status });
  call.emit('customer.subscription.updated', changed);
  return changed;
}

/** An invoice that was paid later brings its subscription back. */
export function followInvoice(call: Call, invoice: Thing): void {
  const subscription = call.books.get(call.account, String(invoice._subscription));
  if (subscription && invoice.status === 'paid' && subscription.status !== 'canceled') {
    setStatus(call, subscription, 'active');
  }
}

/** Lets the current period pass, as the calendar would: a control of the fake, not of the API. */
export function advance(call: Call): Thing {
  const subscription = find(call, 'subscription', call.ids[0]);
  if (['canceled', 'incomplete_expired'].includes(String(subscription.status))) {
    throw invalid('This subscription has ended.');
  }
  if (subscription.cancel_at_period_end) return end(call, subscription);
  const items = itemsOf(subscription).map((item) => ({
    ...item,
    current_period_start: item.current_period_end,
    current_period_end: periodEnd(item.price, item.current_period_end),
  }));
  const next = change(call, subscription, { items: itemList(subscription.id, items) });
  if (next.status === 'trialing') {
    const behaviour = (next.trial_settings as { end_behavior: { missing_payment_method: string } })
      .end_behavior.missing_payment_method;
    const hasMethod = defaultMethod(call, String(next.customer), next.default_payment_method);
    if (!hasMethod && behaviour === 'pause') return setStatus(call, next, 'paused');
    if (!hasMethod && behaviour === 'cancel') return end(call, next);
  }
  if (next.pause_collection || next.status === 'paused') {
    call.emit('customer.subscription.updated', next);
    return next;
  }
  const billed = bill(call, next, 'subscription_cycle');
  if (billed.status === subscription.status) call.emit('customer.subscription.updated', billed);
  return billed;
}

function end(call: Call, subscription: Thing): Thing {
  const ended = change(call, subscription, {
    status: 'canceled',
    canceled_at: subscription.canceled_at ?? call.now,
    ended_at: call.now,
  });
  call.emit('customer.subscription.deleted', ended);
  return ended;
}

function create(call: Call): Thing {
  const customer = find(call, 'customer', required(call, 'customer'));
  return startSubscription(call, customer, call.params);
}

function changedItems(call: Call, subscription: Thing): Item[] {
  const items = [...itemsOf(subscription)];
  for (const entry of list(call.params.items).map(record)) {
    const at = items.findIndex((item) => item.id === entry.id);
    if (entry.id && at < 0) throw noSuch('subscription_item', String(entry.id));
    if (at < 0) {
      items.push(...makeItems(call, subscription.id, [entry]));
    } else if (flag(entry.deleted)) {
      items.splice(at, 1);
    } else {
      const before = items[at] as Item;
      items[at] = {
        ...before,
        price: typeof entry.price === 'string' ? find(call, 'price', entry.price) : before.price,
        quantity: whole(entry.quantity, 'quantity') ?? before.quantity,
      };
    }
  }
  return items;
}

/** Prices change from the next period on: the fake reckons no prorations. */
function update(call: Call): Thing {
  const { params } = call;
  const before = find(call, 'subscription', call.ids[0]);
  if (before.status === 'canceled') {
    throw invalid('A canceled subscription can only update its cancellation_details.');
  }
  const pause = params.pause_collection;
  const method = text(call, 'default_payment_method');
  const cancels = params.cancel_at_period_end;
  const changed = change(call, before, {
    items: itemList(before.id, changedItems(call, before)),
    metadata: metadata(params.metadata, before.metadata),
    default_payment_method: method ? usableMethod(call, method).id : before.default_payment_method,
    cancel_at_period_end: cancels === undefined ? before.cancel_at_period_end : flag(cancels),
    canceled_at: cancels === undefined ? before.canceled_at : flag(cancels) ? call.now : null,
    pause_collection:
      pause === undefined
        ? before.pause_collection
        : pause === ''
          ? null
          : { resumes_at: null, ...record(pause) },
  });
  call.emit('customer.subscription.updated', changed);
  const trialEnds = params.trial_end === 'now' && before.status === 'trialing';
  return trialEnds ? bill(call, changed, 'subscription_cycle') : changed;
}

function resume(call: Call): Thing {
  const subscription = find(call, 'subscription', call.ids[0]);
  if (subscription.status !== 'paused') throw invalid('This subscription is not paused.');
  return bill(call, subscription, 'subscription_update');
}

function listed(call: Call): Record<string, unknown> {
  const status = text(call, 'status');
  const all = call.books.all(call.account, 'subscription').filter((one) => {
    if (status === 'all') return true;
    return status ? one.status === status : one.status !== 'canceled';
  });
  return paged(call, all, ['customer']);
}

export const subscriptionRoutes: Route[] = [
  ['POST', '/v1/subscriptions', create],
  ['GET', '/v1/subscriptions', listed],
  ['GET', '/v1/subscriptions/:', retrieve('subscription')],
  ['POST', '/v1/subscriptions/:', update],
  ['DELETE', '/v1/subscriptions/:', (call) => end(call, find(call, 'subscription', call.ids[0]))],
  ['POST', '/v1/subscriptions/:/resume', resume],
];
