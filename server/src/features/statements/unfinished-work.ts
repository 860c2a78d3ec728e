import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';

type Unfinished = AnswerOf<'statements.closePreview'>['unfinished'];

const most = 50;

/** What is open of a month: it would not stand on the statements made now. */
export async function unfinishedWork(
  context: Pick<Context, 'shopId'>,
  lastDay: string,
  stores: readonly { storeId: string; storeName: string; clientId: string; recipients: number }[],
): Promise<Unfinished> {
  const bind = { shopId: context.shopId, lastDay };
  const deaf = stores.filter((store) => store.recipients === 0);
  return {
    visits: counted(await visitsNotSignedOff(bind)),
    rulings: counted(await rulingsToDecide(bind)),
    withoutRecipient: {
      count: deaf.length,
      items: deaf
        .slice(0, most)
        .map(({ storeId, storeName, clientId }) => ({ storeId, storeName, clientId })),
    },
  };
}

type Bind = { shopId: string; lastDay: string };

function counted<T extends { count: number }>(found: T[]) {
  return { count: found[0]?.count ?? 0, items: found.map(({ count: _, ...item }) => item) };
}

interface VisitRow {
  storeId: string;
  storeName: string;
  clientId: string;
  visitId: string;
  number: number;
  count: number;
}

function visitsNotSignedOff(
  bind: Bind,
): Promise<(VisitRow & { plannedOn: string; state: string })[]> {
  return rows(
    `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId",
       v.id as "visitId", v.number, v.planned_on as "plannedOn", v.state,
       count(*) over ()::int as count
     from visits v join stores s on s.shop_id = v.shop_id and s.id = v.store_id
     where v.shop_id = $shopId and v.ticket_id is null and v.state <> 'cancelled'
       and v.planned_on <= $lastDay
     order by v.planned_on, v.id limit ${most}`,
    bind,
  );
}

function rulingsToDecide(bind: Bind): Promise<(VisitRow & { lines: number })[]> {
  return rows(
    `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId",
       v.id as "visitId", v.number, r.lines, count(*) over ()::int as count
     from visits v
     join stores s on s.shop_id = v.shop_id and s.id = v.store_id
     cross join lateral (
       select count(*)::int as lines from (
         select distinct on (line_key) step, needs_confirmation from rulings
         where shop_id = v.shop_id and visit_id = v.id order by line_key, id desc
       ) newest where step = 'proposed' and needs_confirmation
     ) r
     where v.shop_id = $shopId and v.ticket_id is null and v.state <> 'cancelled'
       and v.planned_on <= $lastDay and r.lines > 0
     order by v.planned_on, v.id limit ${most}`,
    bind,
  );
}
