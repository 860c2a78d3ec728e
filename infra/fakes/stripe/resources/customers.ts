import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  listOf,
  metadata,
  newId,
  record,
  required,
  retrieve,
  type Route,
  text,
  whole,
} from '../call';
import { numberOf, testCard } from '../cards';
import { invalid } from '../errors';

export function createCustomer(call: Call): Thing {
  const customer = call.books.put(call.account, {
    id: newId('cus'),
    object: 'customer',
    created: call.now,
    livemode: false,
    email: text(call, 'email') ?? null,
    name: text(call, 'name') ?? null,
    phone: text(call, 'phone') ?? null,
    description: text(call, 'description') ?? null,
    balance: 0,
    currency: null,
    delinquent: false,
    default_source: null,
    invoice_settings: { default_payment_method: null, custom_fields: null, footer: null },
    metadata: metadata(call.params.metadata),
  });
  call.emit('customer.created', customer);
  return customer;
}

function updateCustomer(call: Call): Thing {
  const before = find(call, 'customer', call.ids[0]);
  const fields = ['email', 'name', 'phone', 'description'].map((name): [string, unknown] => [
    name,
    text(call, name) ?? before[name],
  ]);
  const chosen = record(call.params.invoice_settings).default_payment_method;
  const settings = before.invoice_settings as Record<string, unknown>;
  const customer = change(call, before, {
    ...Object.fromEntries(fields),
    invoice_settings: chosen
      ? { ...settings, default_payment_method: usableMethod(call, String(chosen)).id }
      : settings,
    metadata: metadata(call.params.metadata, before.metadata),
  });
  call.emit('customer.updated', customer);
  return customer;
}

function deleteCustomer(call: Call): Record<string, unknown> {
  const customer = find(call, 'customer', call.ids[0]);
  change(call, customer, { object: 'deleted_customer' });
  call.emit('customer.deleted', customer);
  return { id: customer.id, object: 'customer', deleted: true };
}

export function createCard(call: Call, number: string, month: number, year: number): Thing {
  const card = testCard(number);
  return call.books.put(call.account, {
    id: newId('pm'),
    object: 'payment_method',
    created: call.now,
    livemode: false,
    type: 'card',
    customer: null,
    billing_details: { address: null, email: null, name: null, phone: null },
    card: {
      brand: card.brand,
      last4: card.last4,
      exp_month: month,
      exp_year: year,
      funding: 'credit',
      country: 'US',
    },
    metadata: {},
    _refusal: card.refusal,
  });
}

/** A payment method by id, or one of the ready-made names, which makes a new one each time. */
export function usableMethod(call: Call, idOrName: string): Thing {
  const number = numberOf(idOrName);
  const year = new Date(call.now * 1000).getUTCFullYear();
  return number ? createCard(call, number, 12, year + 2) : find(call, 'payment_method', idOrName);
}

function createMethod(call: Call): Thing {
  const card = record(call.params.card);
  if (required(call, 'type') !== 'card') {
    throw invalid('This fake knows cards only.', undefined, 'type');
  }
  const month = whole(card.exp_month, 'card[exp_month]') ?? 12;
  const year = whole(card.exp_year, 'card[exp_year]') ?? 2100;
  return createCard(call, String(card.number ?? ''), month, year);
}

function attach(call: Call): Thing {
  const method = usableMethod(call, call.ids[0] ?? '');
  const customer = find(call, 'customer', required(call, 'customer'));
  const attached = change(call, method, { customer: customer.id });
  call.emit('payment_method.attached', attached);
  return attached;
}

function detach(call: Call): Thing {
  return change(call, find(call, 'payment_method', call.ids[0]), { customer: null });
}

export const customerRoutes: Route[] = [
  ['POST', '/v1/customers', createCustomer],
  ['GET', '/v1/customers', listOf('customer', ['email'])],
  ['GET', '/v1/customers/:', retrieve('customer')],
  ['POST', '/v1/customers/:', updateCustomer],
  ['DELETE', '/v1/customers/:', deleteCustomer],
  ['POST', '/v1/payment_methods', createMethod],
  ['GET', '/v1/payment_methods', listOf('payment_method', ['customer', 'type'])],
  ['GET', '/v1/payment_methods/:', retrieve('payment_method')],
  ['POST', '/v1/payment_methods/:/attach', attach],
  ['POST', '/v1/payment_methods/:/detach', detach],
];
