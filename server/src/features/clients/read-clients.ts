import { type Context } from '../../core/context';
import { type Bind, row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { found } from '../../core/problems/problem';
import { clientColumns, type ClientRow, presentClient, presentClientSummary } from './client-row';

export function listClients(
  context: Context,
  query: InputOf<'clients.list'>['query'],
): Promise<AnswerOf<'clients.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId, ownStoreId: context.storeId };
    return page<ClientRow, AnswerOf<'clients.list'>['items'][number]>(
      {
        select: `select ${clientColumns} from clients c`,
        from: 'clients c',
        where: [
          'c.shop_id = $shopId',
          ...shown(query.show, 'c.ended_at'),
          ...searched(query.q, ['c.name', 'c.number'], bind),
        ],
        bind,
        sort: { column: `c.${query.sort}`, type: 'text' },
        id: 'c.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentClientSummary,
    );
  });
}

export function showClient(context: Context, clientId: string): Promise<AnswerOf<'clients.show'>> {
  return withTenant(context, async () => {
    const client = await row<ClientRow>(
      `select ${clientColumns} from clients c where c.shop_id = $shopId and c.id = $clientId`,
      { shopId: context.shopId, clientId, ownStoreId: context.storeId },
    );
    return presentClient(context, found(client));
  });
}
