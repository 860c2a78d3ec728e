import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { found } from '../../core/problems/problem';
import { conditionsOf } from '../machines/read-conditions';
import { ownClient, ownStore, refuseOtherStore } from './own-store';
import {
  machineCountsOf,
  presentStore,
  presentStoreSummary,
  storeColumns,
  storeFrom,
  type StoreRow,
} from './store-row';

export function listStores(
  context: Context,
  query: InputOf<'stores.list'>['query'],
): Promise<AnswerOf<'stores.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      's.shop_id = $shopId',
      ...ownClient(context, 's.client_id', bind),
      ...ownStore(context, 's.id', bind),
      ...shown(query.show, 's.ended_at'),
      ...searched(query.q, ['s.name', 's.number', 's.address', 'c.name'], bind),
    ];
    if (query.clientId) {
      bind.clientId = query.clientId;
      where.push('s.client_id = $clientId');
    }
    return page<StoreRow, AnswerOf<'stores.list'>['items'][number]>(
      {
        select: `select ${storeColumns} from ${storeFrom} ${machineCountsOf}`,
        from: storeFrom,
        where,
        bind,
        sort: { column: `s.${query.sort}`, type: 'text' },
        id: 's.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentStoreSummary,
    );
  });
}

export function showStore(context: Context, storeId: string): Promise<AnswerOf<'stores.show'>> {
  return withTenant(context, async () => {
    refuseOtherStore(context, storeId);
    const bind = { shopId: context.shopId, storeId };
    const store = found(
      await row<StoreRow>(
        `select ${storeColumns} from ${storeFrom} ${machineCountsOf}
         where s.shop_id = $shopId and s.id = $storeId`,
        bind,
      ),
    );
    const calls = found(
      await row<{ n: number }>(
        `select count(*)::int as n from calls
         where shop_id = $shopId and store_id = $storeId and state in ('open', 'planned')`,
        bind,
      ),
    );
    return presentStore(store, {
      conditions: await conditionsOf(context, { storeId, show: 'open' }),
      openItems: await openItemsOf(bind),
      openCalls: calls.n,
    });
  });
}

async function openItemsOf(bind: Bind): Promise<AnswerOf<'stores.show'>['openItems']> {
  const found = await rows<{
    id: string;
    words: string;
    created_at: Date;
    machine_id: string | null;
    bay: string | null;
  }>(
    `select o.id, o.words, o.created_at, m.id as machine_id, m.bay
     from open_items o left join machines m on m.shop_id = o.shop_id and m.id = o.machine_id
     where o.shop_id = $shopId and o.store_id = $storeId and o.done_at is null
     order by o.created_at, o.id limit 100`,
    bind,
  );
  return found.map((item) => ({
    id: item.id,
    machine: item.machine_id && item.bay ? { id: item.machine_id, bay: item.bay } : null,
    words: item.words,
    createdAt: item.created_at.toISOString(),
  }));
}
