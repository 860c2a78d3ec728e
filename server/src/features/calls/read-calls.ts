import { type MachineState } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { filtered } from '../../core/lists/filtered';
import { page, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { dayName } from '../statements/document-names';
import { ownClient, ownStore } from '../stores/own-store';
import { callProgress } from './call-progress';
import { callColumns, callFrom, type CallRow, presentCall } from './call-row';

export function listCalls(
  context: Context,
  query: InputOf<'calls.list'>['query'],
): Promise<AnswerOf<'calls.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'k.shop_id = $shopId',
      ...ownClient(context, 'k.client_id', bind),
      ...ownStore(context, 'k.store_id', bind),
      ...searched(query.q, ['k.number::text', 'k.words', 's.name', 'm.bay'], bind),
    ];
    if (query.state === 'live') where.push(`k.state in ('open', 'planned')`);
    else where.push(...filtered(query, { state: 'k.state' }, bind));
    where.push(...filtered(query, filterColumns, bind));
    return page<CallRow, AnswerOf<'calls.list'>['items'][number]>(
      {
        select: `select ${callColumns} from ${callFrom}`,
        from: callFrom,
        where,
        bind,
        sort: { column: 'k.created_at', type: 'timestamptz', descending: true },
        id: 'k.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentCall,
    );
  });
}

const filterColumns = {
  storeId: 'k.store_id',
  clientId: 'k.client_id',
  machineId: 'k.machine_id',
} as const;

interface ShownRow extends CallRow {
  machineState: MachineState | null;
  plannedAt: Date | null;
  confirmedAt: Date | null;
  arrivedAt: Date | null;
}

export function showCall(context: Context, callId: string): Promise<AnswerOf<'calls.show'>> {
  return withTenant(context, async () => {
    const bind: Bind = { shopId: context.shopId, callId };
    const where = ['k.shop_id = $shopId', 'k.id = $callId'];
    const call = found(
      await row<ShownRow>(
        `select ${callColumns}, m.state as "machineState", k.planned_at as "plannedAt",
           v.confirmed_at as "confirmedAt", v.arrived_at as "arrivedAt"
         from ${callFrom}
         where ${[...where, ...ownStore(context, 'k.store_id', bind)].join(' and ')}`,
        bind,
      ),
    );
    const { locale } = await shopFacts(context);
    const visitDay = call.plannedOn === null ? null : dayName(call.plannedOn, locale);
    return {
      ...presentCall(call),
      machineState: call.machineState,
      progress: callProgress({ ...call, visitDay }),
      photos: await photosOf(context, callId),
    };
  });
}

async function photosOf(
  context: Context,
  callId: string,
): Promise<AnswerOf<'calls.show'>['photos']> {
  const photos = await rows<{
    id: string;
    name: string;
    contentType: string;
    bytes: number;
    addedAt: Date;
  }>(
    `select id, name, content_type as "contentType", bytes, created_at as "addedAt"
     from attachments where shop_id = $shopId and owner_kind = 'call' and owner_id = $callId
     order by created_at, id`,
    { shopId: context.shopId, callId },
  );
  return photos.map((photo) => ({
    ...photo,
    ownerKind: 'call',
    ownerId: callId,
    addedAt: photo.addedAt.toISOString(),
  }));
}
