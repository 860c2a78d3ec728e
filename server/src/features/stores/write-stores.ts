import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { invalid, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { freeNumber, numberTaken } from '../clients/free-number';
import { countUsage, refusePastLimit } from '../subscription/plan-limits';
import { showStore } from './read-stores';

type Store = AnswerOf<'stores.show'>;

const columns = {
  name: 'name',
  number: 'number',
  address: 'address',
  zone: 'zone',
  hours: 'hours',
  accessWords: 'access_words',
  taxPlace: 'tax_place',
  tripPlace: 'trip_place',
  tripMetres: 'trip_metres',
  cardValue: 'card_value',
};

export function createStore(
  context: Context,
  body: InputOf<'stores.create'>['body'],
): Promise<Store> {
  return withTenant(context, async () => {
    await refuseClientNotServed(context, body.clientId);
    if (body.number) await refuseTaken(context, body.number, null);
    await refusePastLimit(context, 'stores', 1);
    const id = uuid();
    await write(
      `insert into stores (shop_id, id, client_id, name, number, address, zone, hours, access_words,
         tax_place, trip_place, trip_metres, card_value)
       values ($shopId, $id, $clientId, $name, $number, $address, $zone, $hours, $accessWords,
         $taxPlace, $tripPlace, $tripMetres, $cardValue)`,
      {
        shopId: context.shopId,
        id,
        clientId: body.clientId,
        name: body.name,
        number: body.number ?? (await freeNumber(context, 'stores')),
        address: body.address ?? '',
        zone: body.zone ?? null,
        hours: body.hours ?? '',
        accessWords: body.accessWords ?? '',
        taxPlace: body.taxPlace ?? '',
        tripPlace: body.tripPlace ?? '',
        tripMetres: body.tripMetres ?? null,
        cardValue: body.cardValue ?? 0,
      },
    );
    await countUsage(context);
    return noted(context, 'store added', id);
  });
}

export function changeStore(
  context: Context,
  storeId: string,
  version: number,
  body: InputOf<'stores.change'>['body'],
): Promise<Store> {
  return withTenant(context, async () => {
    if (body.number) await refuseTaken(context, body.number, storeId);
    const { set, bind } = changes(body, columns);
    await update(context, storeId, version, set, bind);
    return noted(context, 'store changed', storeId, { fields: Object.keys(body) });
  });
}

export function endStore(context: Context, storeId: string, version: number): Promise<Store> {
  return withTenant(context, async () => {
    await update(context, storeId, version, 'ended_at = coalesce(ended_at, $now)', {
      now: context.now,
    });
    const visits = await row(
      `select 1 from visits where shop_id = $shopId and store_id = $storeId
         and state in ('planned', 'confirmed', 'in_process') limit 1`,
      { shopId: context.shopId, storeId },
    );
    if (visits) throw problem('conflict', 'A visit is planned there: cancel or finish it first.');
    await countUsage(context);
    return noted(context, 'store ended', storeId);
  });
}

export function resumeStore(context: Context, storeId: string, version: number): Promise<Store> {
  return withTenant(context, async () => {
    await refusePastLimit(context, 'stores', 1);
    const store = await update(context, storeId, version, 'ended_at = null', {});
    await refuseClientNotServed(context, store.client_id);
    await countUsage(context);
    return noted(context, 'store resumed', storeId);
  });
}

async function update(
  context: Context,
  storeId: string,
  version: number,
  set: string,
  bind: Record<string, unknown>,
): Promise<{ client_id: string }> {
  const key = { shopId: context.shopId, storeId };
  return orStale(
    await write<{ client_id: string }>(
      `update stores set ${set} where shop_id = $shopId and id = $storeId and version = $version
       returning client_id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from stores where shop_id = $shopId and id = $storeId', key),
  );
}

async function refuseClientNotServed(context: Context, clientId: string): Promise<void> {
  const client = await row<{ ended_at: Date | null }>(
    'select ended_at from clients where shop_id = $shopId and id = $clientId',
    { shopId: context.shopId, clientId },
  );
  if (!client) throw invalid([{ pointer: '/clientId', detail: 'is no client of the shop' }]);
  if (client.ended_at) throw problem('conflict', 'The client has ended: resume it first.');
}

async function refuseTaken(context: Context, number: string, exceptId: string | null) {
  if (await numberTaken(context, 'stores', number, exceptId)) {
    throw invalid([{ pointer: '/number', detail: 'is the number of another store' }]);
  }
}

async function noted(
  context: Context,
  what: string,
  storeId: string,
  details: Record<string, unknown> = {},
): Promise<Store> {
  const store = await showStore(context, storeId);
  await record(context, what, { kind: 'store', id: storeId }, details);
  await announce(context, 'stores', storeId, store.client.id);
  return store;
}
