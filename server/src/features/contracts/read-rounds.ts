import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { ownClient } from '../stores/own-store';

type Round = AnswerOf<'rounds.list'>['items'][number];

const from = `rounds r
  join contracts k on k.shop_id = r.shop_id and k.id = r.contract_id
  join stores s on s.shop_id = r.shop_id and s.id = r.store_id
  left join visits v on v.shop_id = r.shop_id and v.id = r.visit_id`;

/** The visit says how the round went, before the sweep writes it down. */
const state = `case v.state when 'completed' then 'done' when 'cancelled' then 'skipped' else r.state end`;

export function listRounds(
  context: Context,
  query: InputOf<'rounds.list'>['query'],
): Promise<AnswerOf<'rounds.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'r.shop_id = $shopId',
      ...ownClient(context, 'r.client_id', bind),
      ...searched(query.q, ['s.name', 'k.name'], bind),
    ];
    const filter = (value: string | undefined, name: string, condition: string) => {
      if (value === undefined) return;
      bind[name] = value;
      where.push(condition);
    };
    filter(query.contractId, 'contractId', 'r.contract_id = $contractId');
    filter(query.storeId, 'storeId', 'r.store_id = $storeId');
    filter(query.state, 'state', `${state} = $state`);
    filter(query.from, 'from', 'r.planned_on >= $from');
    filter(query.to, 'to', 'r.planned_on <= $to');
    return page<Round, Round>(
      {
        select: `select r.id, r.contract_id as "contractId", k.name as "contractName",
          r.store_id as "storeId", s.name as "storeName", r.due_on as "dueOn",
          r.planned_on as "plannedOn", ${state} as state, r.visit_id as "visitId",
          v.number as "visitNumber", v.state as "visitState" from ${from}`,
        from,
        where,
        bind,
        sort: {
          column: 'r.planned_on',
          type: 'date',
          descending: query.sort === '-plannedOn',
        },
        id: 'r.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (round) => ({
        id: round.id,
        contractId: round.contractId,
        contractName: round.contractName,
        storeId: round.storeId,
        storeName: round.storeName,
        dueOn: round.dueOn,
        plannedOn: round.plannedOn,
        state: round.state,
        visitId: round.visitId,
        visitNumber: round.visitNumber,
        visitState: round.visitState,
      }),
    );
  });
}
