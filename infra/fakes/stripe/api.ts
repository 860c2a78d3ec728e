import { type Books, platform, type Thing } from './books';
import {
  type Call,
  list,
  listOf,
  newId,
  paged,
  type Resource,
  retrieve,
  type Route,
  text,
} from './call';
import { ApiError } from './errors';
import { accountRoutes } from './resources/accounts';
import { catalogueRoutes } from './resources/catalogue';
import { checkoutRoutes } from './resources/checkout';
import { customerRoutes } from './resources/customers';
import { invoiceRoutes } from './resources/invoices';
import { paymentRoutes } from './resources/payments';
import { refundRoutes } from './resources/refunds';
import { followInvoice, subscriptionRoutes } from './resources/subscriptions';

export const apiVersion = '2026-10-28.endive';

function events(call: Call): Record<string, unknown> {
  const types = new Set([text(call, 'type'), ...list(call.params.types).map(String)]);
  types.delete(undefined);
  const all = call.books
    .all(call.account, 'event')
    .filter((event) => types.size === 0 || types.has(String(event.type)));
  return paged(call, all);
}

const routes: Route[] = [
  ...accountRoutes,
  ...catalogueRoutes,
  ...checkoutRoutes,
  ...customerRoutes,
  ...invoiceRoutes(followInvoice),
  ...paymentRoutes,
  ...refundRoutes,
  ...subscriptionRoutes,
  ['GET', '/v1/events', events],
  ['GET', '/v1/events/:', retrieve('event')],
  ['GET', '/v1/subscription_items', listOf('subscription_item')],
  ['GET', '/v1/balance', () => ({ object: 'balance', available: [], pending: [] })],
];

const compiled = routes.map(([method, path, resource]) => ({
  method,
  pattern: new RegExp(`^${path.replaceAll('/:', '/([^/]+)')}$`),
  resource,
}));

/** The function for a request, and the variable parts of its path. */
export function resourceFor(method: string, path: string): { resource: Resource; ids: string[] } {
  for (const route of compiled) {
    const found = route.method === method ? route.pattern.exec(path) : null;
    if (found) return { resource: route.resource, ids: found.slice(1).map(decodeURIComponent) };
  }
  throw new ApiError(404, {
    type: 'invalid_request_error',
    message: `Unrecognized request URL (${method}: ${path}). The local fake does not have it.`,
  });
}

/** Other people's accounts, and accounts that do not exist, look the same. */
export function checkAccount(books: Books, account: string): void {
  if (!account || books.get(platform, account)?.object === 'account') return;
  throw new ApiError(403, {
    type: 'invalid_request_error',
    code: 'account_invalid',
    message: `The provided key does not have access to account '${account}' (or that account does not exist).`,
  });
}

function visible(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(visible);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .filter(([name]) => !name.startsWith('_'))
      .map(([name, inner]) => [name, visible(inner)]),
  );
}

function expandAt(call: Call, value: unknown, path: readonly string[]): unknown {
  const [name = '', ...rest] = path;
  if (Array.isArray(value)) return value.map((entry) => expandAt(call, entry, path));
  if (typeof value === 'string') {
    const thing = call.books.get(call.account, value);
    return thing ? expandAt(call, thing, path) : value;
  }
  if (!name || typeof value !== 'object' || value === null) return value;
  const thing = value as Record<string, unknown>;
  if (name === 'line_items' && thing._lines) {
    return { ...thing, line_items: { object: 'list', data: thing._lines, has_more: false } };
  }
  return name in thing ? { ...thing, [name]: expandAt(call, thing[name], rest) } : thing;
}

/** What is shown of a result: the expansions that were asked for, and none of our own notes. */
export function presented(call: Call, result: Thing | Record<string, unknown>): unknown {
  const wanted = list(call.params.expand).map((path) => String(path).split('.'));
  return visible(wanted.reduce<unknown>((value, path) => expandAt(call, value, path), result));
}

export function makeEvent(call: Call, type: string, thing: Thing, request: object): Thing {
  return {
    id: newId('evt'),
    object: 'event',
    api_version: apiVersion,
    created: call.now,
    ...(call.account ? { account: call.account } : {}),
    data: { object: visible(thing) },
    livemode: false,
    pending_webhooks: 1,
    request,
    type,
  };
}
