import { tradeDayOf } from '@lib/domain';
import { type Context } from '../../core/context';
import { type Bind, row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched, type SortKey } from '../../core/lists/keyset';
import { shopFacts } from '../../core/shop-facts';
import { ownClient } from '../stores/own-store';

type Balance = AnswerOf<'balances.list'>['items'][number];
type AgeingRow = AnswerOf<'receivables.list'>['items'][number];

type BalanceRow = Omit<Balance, 'currency' | 'cardPossible'>;

export function listBalances(
  context: Context,
  query: InputOf<'balances.list'>['query'],
): Promise<AnswerOf<'balances.list'>> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    const today = tradeDayOf(context.now, shop.zone);
    const bind: Bind = { shopId: context.shopId };
    const where = [
      's.shop_id = $shopId',
      's.ended_at is null',
      ...ownClient(context, 's.client_id', bind),
      ...searched(query.q, ['s.name', 's.number'], bind),
    ];
    if (query.clientId) where.push('s.client_id = $clientId');
    if (query.storeId) where.push('s.id = $storeId');
    Object.assign(bind, { clientId: query.clientId, storeId: query.storeId, today });
    const from = 'stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id';
    return page<BalanceRow, Balance>(
      {
        select: `select s.id as "storeId", s.name as "storeName", s.client_id as "clientId",
          c.name as "clientName", b.balance, b.unbilled, greatest(0, least(o.overdue, b.balance)) as overdue,
          case when b.balance > 0 then o.due_on end as "dueOn",
          l.id as "lastStatementId", l.month as "lastStatementMonth",
          p.received_on as "lastPaidOn", p.amount as "lastPaid"
          from ${from}
          cross join lateral (
            select coalesce(sum(amount) filter (where account = 'receivable'), 0)::bigint as balance,
              coalesce(sum(amount) filter (where account = 'unbilled'), 0)::bigint as unbilled
            from entries where shop_id = s.shop_id and store_id = s.id
              and account in ('receivable', 'unbilled')
          ) b
          cross join lateral (${openBy('s')}) o
          left join lateral (select id, month from statements
            where shop_id = s.shop_id and store_id = s.id order by month desc limit 1) l on true
          left join lateral (select received_on, amount from payments
            where shop_id = s.shop_id and store_id = s.id and state = 'succeeded'
            order by received_on desc, number desc limit 1) p on true`,
        from,
        where,
        bind,
        sort: { column: 's.name', type: 'text' },
        id: 's.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (balance) => ({
        storeId: balance.storeId,
        storeName: balance.storeName,
        clientId: balance.clientId,
        clientName: balance.clientName,
        currency: shop.currency,
        balance: balance.balance,
        overdue: balance.overdue,
        dueOn: balance.dueOn,
        unbilled: balance.unbilled,
        lastStatementId: balance.lastStatementId,
        lastStatementMonth: balance.lastStatementMonth,
        lastPaidOn: balance.lastPaidOn,
        lastPaid: balance.lastPaid,
        cardPossible: shop.cardAccount !== null,
      }),
    );
  });
}

const allocated = `coalesce((select sum(a.amount)::bigint from allocations a
  where a.shop_id = t.shop_id and a.statement_id = t.id), 0)`;

/** What is open of a store's statements, by days past due on $today; `store` is its alias. */
function openBy(store: string): string {
  const sum = (condition: string) => `coalesce(sum(i.open) filter (where ${condition}), 0)::bigint`;
  return `select min(i.due_on) filter (where i.open > 0) as due_on,
      ${sum('i.days > 0')} as overdue, ${sum('i.days <= 0')} as current,
      ${sum('i.days between 1 and 30')} as days1, ${sum('i.days between 31 and 60')} as days31,
      ${sum('i.days between 61 and 90')} as days61, ${sum('i.days > 90')} as over90,
      coalesce(sum(i.open), 0)::bigint as open
    from (select t.due_on, $today::date - t.due_on as days, t.charged + t.tax - ${allocated} as open
      from statements t where t.shop_id = ${store}.shop_id and t.store_id = ${store}.id) i`;
}

/** Every store with its open balance by age. A credit is what the ledger says less than is open. */
const aged = `(select s.shop_id, s.id, s.name, s.client_id, o.current, o.days1, o.days31, o.days61,
    o.over90, o.overdue, b.balance as total, b.balance - o.open as credit
  from stores s
  cross join lateral (${openBy('s')}) o
  cross join lateral (select coalesce(sum(amount), 0)::bigint as balance from entries
    where shop_id = s.shop_id and store_id = s.id and account = 'receivable') b
  where s.shop_id = $shopId) r`;

const sorts: Record<InputOf<'receivables.list'>['query']['sort'], SortKey> = {
  '-overdue': { column: 'r.overdue', type: 'bigint', descending: true },
  '-total': { column: 'r.total', type: 'bigint', descending: true },
  store: { column: 'r.name', type: 'text' },
};

const bucketColumns = `r.current, r.days1 as "days1To30", r.days31 as "days31To60",
  r.days61 as "days61To90", r.over90, r.credit, r.total`;

export function listReceivables(
  context: Context,
  query: InputOf<'receivables.list'>['query'],
): Promise<AnswerOf<'receivables.list'>> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    const on = tradeDayOf(context.now, shop.zone);
    const bind: Bind = { shopId: context.shopId, today: on };
    const where = [
      'r.shop_id = $shopId',
      '(r.total <> 0 or r.overdue <> 0)',
      ...searched(query.q, ['r.name', 'c.name'], bind),
    ];
    if (query.overdue) where.push('r.overdue > 0');
    if (query.clientId) {
      bind.clientId = query.clientId;
      where.push('r.client_id = $clientId');
    }
    const from = `${aged} join clients c on c.shop_id = r.shop_id and c.id = r.client_id`;
    const list = await page<AgeingRow, AgeingRow>(
      {
        select: `select r.id as "storeId", r.name as "storeName", r.client_id as "clientId",
          c.name as "clientName", ${bucketColumns} from ${from}`,
        from,
        where,
        bind,
        sort: sorts[query.sort],
        id: 'r.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      ({ storeId, storeName, clientId, clientName, ...rest }) => ({
        storeId,
        storeName,
        clientId,
        clientName,
        ...bucketsOf(rest),
      }),
    );
    return { ...list, on, currency: shop.currency, totals: await totals(bind) };
  });
}

type Buckets = AnswerOf<'receivables.list'>['totals'];

function bucketsOf(found: Buckets): Buckets {
  const { current, days1To30, days31To60, days61To90, over90, credit, total } = found;
  return { current, days1To30, days31To60, days61To90, over90, credit, total };
}

async function totals({ shopId, today }: Bind): Promise<Buckets> {
  const sum = (column: string) => `coalesce(sum(r.${column}), 0)::bigint`;
  const found = await row<Buckets>(
    `select ${sum('current')} as current, ${sum('days1')} as "days1To30",
       ${sum('days31')} as "days31To60", ${sum('days61')} as "days61To90",
       ${sum('over90')} as over90, ${sum('credit')} as credit, ${sum('total')} as total
     from ${aged}`,
    { shopId, today },
  );
  return bucketsOf(found as Buckets);
}
