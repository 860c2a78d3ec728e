import { type OpenItem } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, rows } from '../../core/database/tenancy';

/** A statement of which something is not paid yet. */
export interface OpenStatement extends OpenItem {
  storeId: string;
  month: string;
  number: number;
}

/** Statements of some stores with something open, oldest first. Inside a tenant transaction. */
export function openStatements(
  context: Pick<Context, 'shopId'>,
  storeIds: readonly string[],
): Promise<OpenStatement[]> {
  return rows<OpenStatement>(
    `select s.id, s.store_id as "storeId", s.month, s.number, s.due_on as "dueOn",
       s.charged + s.tax - coalesce(a.paid, 0) as open
     from statements s
     left join lateral (
       select sum(amount)::bigint as paid from allocations
       where shop_id = s.shop_id and statement_id = s.id
     ) a on true
     where s.shop_id = $shopId and s.store_id = any ($storeIds::uuid[])
       and s.charged + s.tax - coalesce(a.paid, 0) > 0
     order by s.due_on, s.id`,
    { shopId: context.shopId, storeIds },
  );
}

/** What a store owes by the ledger, minor units; below zero when it paid ahead. */
export async function storeBalance(
  context: Pick<Context, 'shopId'>,
  storeId: string,
): Promise<number> {
  const sum = await row<{ balance: number }>(
    `select coalesce(sum(amount), 0)::bigint as balance from entries
     where shop_id = $shopId and store_id = $storeId and account = 'receivable'`,
    { shopId: context.shopId, storeId },
  );
  return sum?.balance ?? 0;
}

/** A payment of which something is left over for statements to come. */
export interface UnusedCredit {
  storeId: string;
  paymentId: string;
  credit: number;
}

/** Payments of some stores that paid ahead, oldest first. */
export function unusedCredits(
  context: Pick<Context, 'shopId'>,
  storeIds: readonly string[],
): Promise<UnusedCredit[]> {
  return rows<UnusedCredit>(
    `select p.store_id as "storeId", p.id as "paymentId", p.amount - r.given_back - a.used as credit
     from payments p
     cross join lateral (
       select coalesce(sum(amount), 0)::bigint as given_back from refunds
       where shop_id = p.shop_id and payment_id = p.id
     ) r
     cross join lateral (
       select coalesce(sum(amount), 0)::bigint as used from allocations
       where shop_id = p.shop_id and payment_id = p.id
     ) a
     where p.shop_id = $shopId and p.store_id = any ($storeIds::uuid[]) and p.state = 'succeeded'
       and p.amount - r.given_back - a.used > 0
     order by p.received_on, p.id`,
    { shopId: context.shopId, storeIds },
  );
}
