import { type Context } from '../../core/context';
import { type Bind, rows } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

type OpenItem = AnswerOf<'visits.show'>['handedOver'][number];

interface ItemRow {
  id: string;
  storeId: string;
  machineId: string | null;
  bay: string | null;
  words: string;
  visitId: string;
  createdAt: Date;
  doneAt: Date | null;
}

/** What a visit left for the next one. */
export async function openItemsLeftBy(context: Context, visitId: string): Promise<OpenItem[]> {
  return (await items('o.visit_id = $visitId', { shopId: context.shopId, visitId })).map(present);
}

/** What is still to do at some stores, by store. */
export async function openItemsAt(
  context: Context,
  storeIds: readonly string[],
): Promise<Map<string, OpenItem[]>> {
  const byStore = new Map<string, OpenItem[]>(storeIds.map((id) => [id, []]));
  const open = await items('o.store_id = any ($storeIds::uuid[]) and o.done_at is null', {
    shopId: context.shopId,
    storeIds,
  });
  for (const item of open) byStore.get(item.storeId)?.push(present(item));
  return byStore;
}

function items(where: string, bind: Bind): Promise<ItemRow[]> {
  return rows<ItemRow>(
    `select o.id, o.store_id as "storeId", m.id as "machineId", m.bay, o.words,
       o.visit_id as "visitId", o.created_at as "createdAt", o.done_at as "doneAt"
     from open_items o left join machines m on m.shop_id = o.shop_id and m.id = o.machine_id
     where o.shop_id = $shopId and ${where} order by o.created_at, o.id`,
    bind,
  );
}

function present(item: ItemRow): OpenItem {
  const { machineId, bay } = item;
  return {
    id: item.id,
    machine: machineId !== null && bay !== null ? { id: machineId, bay } : null,
    words: item.words,
    visitId: item.visitId,
    createdAt: item.createdAt.toISOString(),
    doneAt: instantOrNull(item.doneAt),
  };
}
