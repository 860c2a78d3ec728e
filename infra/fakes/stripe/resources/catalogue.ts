import { type Thing } from '../books';
import {
  type Call,
  change,
  find,
  flag,
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
import { type Params } from '../form';
import { missing } from '../errors';
import { checkedCurrency } from './payments';

function createProduct(call: Call): Thing {
  const product = call.books.put(call.account, {
    id: text(call, 'id') ?? newId('prod'),
    object: 'product',
    created: call.now,
    livemode: false,
    active: true,
    name: required(call, 'name'),
    description: text(call, 'description') ?? null,
    default_price: null,
    metadata: metadata(call.params.metadata),
  });
  call.emit('product.created', product);
  return product;
}

/** A price as its own request gives it, or as `price_data` within another. */
export function makePrice(call: Call, params: Params): Thing {
  if (typeof params.currency !== 'string') throw missing('currency');
  const recurring = record(params.recurring);
  const data = record(params.product_data);
  const product =
    typeof params.product === 'string'
      ? find(call, 'product', params.product)
      : createProduct({ ...call, params: data });
  const amount = whole(params.unit_amount, 'unit_amount');
  if (amount === undefined) throw missing('unit_amount');
  return call.books.put(call.account, {
    id: newId('price'),
    object: 'price',
    created: call.now,
    livemode: false,
    active: true,
    billing_scheme: 'per_unit',
    currency: checkedCurrency(params.currency),
    lookup_key: typeof params.lookup_key === 'string' ? params.lookup_key : null,
    metadata: metadata(params.metadata),
    nickname: typeof params.nickname === 'string' ? params.nickname : null,
    product: product.id,
    recurring: recurring.interval
      ? {
          interval: recurring.interval,
          interval_count: whole(recurring.interval_count, 'interval_count') ?? 1,
          usage_type: 'licensed',
        }
      : null,
    tax_behavior: 'unspecified',
    type: recurring.interval ? 'recurring' : 'one_time',
    unit_amount: amount,
    unit_amount_decimal: String(amount),
  });
}

function createPrice(call: Call): Thing {
  const price = makePrice(call, call.params);
  call.emit('price.created', price);
  return price;
}

function update(object: string): (call: Call) => Thing {
  return (call) => {
    const thing = find(call, object, call.ids[0]);
    const changed = change(call, thing, {
      active: call.params.active === undefined ? thing.active : flag(call.params.active),
      ...(text(call, 'name') ? { name: text(call, 'name') } : {}),
      metadata: metadata(call.params.metadata, thing.metadata),
    });
    call.emit(`${object}.updated`, changed);
    return changed;
  };
}

export const catalogueRoutes: Route[] = [
  ['POST', '/v1/products', createProduct],
  ['GET', '/v1/products', listOf('product')],
  ['GET', '/v1/products/:', retrieve('product')],
  ['POST', '/v1/products/:', update('product')],
  ['POST', '/v1/prices', createPrice],
  ['GET', '/v1/prices', listOf('price', ['product', 'type'])],
  ['GET', '/v1/prices/:', retrieve('price')],
  ['POST', '/v1/prices/:', update('price')],
];
