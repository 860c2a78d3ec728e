import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { filtered } from '../../core/lists/filtered';
import { page, searched } from '../../core/lists/keyset';
import { workedOnColumn } from '../visits/job-reference';

type Waiting = AnswerOf<'rulings.waiting'>['items'][number];

interface WaitingRow extends Omit<Waiting, 'store' | 'client'> {
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
}

/** Only visits without a ticket can wait, so the newest rulings of few visits are looked at. */
const waitingFrom = `visits v
  join stores s on s.shop_id = v.shop_id and s.id = v.store_id
  join clients c on c.shop_id = v.shop_id and c.id = v.client_id
  cross join lateral (
    select count(distinct r.job_id)::int as jobs, count(*)::int as lines,
      coalesce(sum(r.list), 0)::bigint as list, coalesce(sum(r.cost), 0)::bigint as cost
    from (select distinct on (line_key) job_id, step, needs_confirmation, list, cost from rulings
      where shop_id = v.shop_id and visit_id = v.id order by line_key, id desc) r
    where r.step = 'proposed' and r.needs_confirmation) w`;

/** Visits with lines that the owner must decide, those that wait longest first. */
export function listWaiting(
  context: Context,
  query: InputOf<'rulings.waiting'>['query'],
): Promise<AnswerOf<'rulings.waiting'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    return page<WaitingRow, Waiting>(
      {
        select: `select v.id as "visitId", v.number as "visitNumber",
            ${workedOnColumn('v', 'h')}::text as on, s.id as "storeId", s.name as "storeName",
            c.id as "clientId", c.name as "clientName", m.name as tech, w.jobs, w.lines, w.list, w.cost
          from ${waitingFrom} join shops h on h.id = v.shop_id
          left join memberships m on m.shop_id = v.shop_id and m.id = v.tech_membership_id`,
        from: waitingFrom,
        where: [
          'v.shop_id = $shopId',
          `v.state = 'completed'`,
          'v.ticket_id is null',
          'w.lines > 0',
          ...filtered(query, { clientId: 'v.client_id' }, bind),
          ...searched(query.q, ['v.number::text', 's.name', 'c.name'], bind),
        ],
        bind,
        sort: { column: 'v.planned_on', type: 'date' },
        id: 'v.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      ({ storeId, storeName, clientId, clientName, ...visit }) => ({
        ...visit,
        store: { id: storeId, name: storeName },
        client: { id: clientId, name: clientName },
      }),
    );
  });
}
