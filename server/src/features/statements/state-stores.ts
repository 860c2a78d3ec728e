import { agreesWith, buildStatement, monthBounds, type StatementSnapshot } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { rows, withTenant } from '../../core/database/tenancy';
import { type ShopFacts } from '../../core/shop-facts';
import { statementName } from './document-names';
import { type BuiltStatement, type RunFacts, type StoreToState } from './built-statement';
import { dueDocuments } from './due-documents';
import { keepStatements } from './keep-statements';
import { makeFees } from './make-fees';
import { noteFailures, type StoreFailure } from './note-failures';

/**
 * Builds, posts and numbers the statements of some stores, in one transaction: either all of them
 * are there, or none. A store that another attempt has done, or is just doing, is passed over; one
 * whose figures do not add up is noted as failed and keeps no other from its statement.
 *
 * @returns the stores that failed
 */
export function stateStores(
  context: Context,
  shop: ShopFacts,
  run: RunFacts,
  storeIds: readonly string[],
): Promise<StoreFailure[]> {
  return withTenant(context, async () => {
    const stores = await lockStores(context, await claimStores(context, run, storeIds));
    if (stores.length === 0) return [];
    const ids = stores.map(({ id }) => id);
    await makeFees(context, shop, run.months, ids);
    const due = await dueDocuments(context, shop, ids, monthBounds(run.month, shop.zone).lastDay);
    const closings = await lastClosings(context, ids);
    // Looked at and held, and moved on below by as many as are built: no number is left out.
    let number = await nextNumber(context, 'statement', 0);
    const built: BuiltStatement[] = [];
    const failed: StoreFailure[] = [];
    for (const store of stores) {
      try {
        const { visits, ...documents } = due(store.id);
        const snapshot = buildStatement({
          store: printed(store),
          period: run.month,
          opening: closings.get(store.id) ?? 0,
          ...documents,
          creditNotes: [],
          terms: {
            number: statementName(number),
            currency: shop.currency,
            date: run.issuedOn,
            days: store.termsDays ?? shop.termsDays,
          },
        });
        mustFollow(snapshot, closings.get(store.id));
        built.push({ id: uuid(), number, store, snapshot: { ...snapshot, visits } });
        number += 1;
      } catch (error) {
        failed.push({ storeId: store.id, error });
      }
    }
    if (built.length > 0) {
      await nextNumber(context, 'statement', built.length);
      await keepStatements(context, run, built);
    }
    await noteFailures(context, run.id, failed);
    return failed;
  });
}

function printed({ id, name, clientName, address }: StoreToState) {
  return {
    id,
    name,
    clientName,
    address: address.split('\n').filter((line) => line.trim() !== ''),
  };
}

function mustFollow(snapshot: StatementSnapshot, closing: number | undefined): void {
  if (agreesWith(snapshot, closing === undefined ? undefined : { closing })) return;
  throw new RangeError('It does not open with what the last statement closed with');
}

/** The stores' rows of the run, held; none of those that are done, being done, or of a held run. */
async function claimStores(
  context: Context,
  run: RunFacts,
  storeIds: readonly string[],
): Promise<Map<string, string>> {
  const claimed = await rows<{ id: string; storeId: string }>(
    `select s.id, s.store_id as "storeId" from statement_run_stores s
     where s.shop_id = $shopId and s.run_id = $runId and s.store_id = any ($storeIds::uuid[])
       and s.state = 'waiting'
       and exists (select 1 from statement_runs r
         where r.shop_id = s.shop_id and r.id = s.run_id and r.state = 'building')
     for update of s skip locked`,
    { shopId: context.shopId, runId: run.id, storeIds },
  );
  return new Map(claimed.map(({ id, storeId }) => [storeId, id]));
}

/** Payments of a store take turns with its statement on the store's row. */
async function lockStores(
  context: Context,
  claimed: ReadonlyMap<string, string>,
): Promise<StoreToState[]> {
  const stores = await rows<Omit<StoreToState, 'rowId'>>(
    `select s.id, s.name, s.address, s.client_id as "clientId", c.name as "clientName",
       c.terms_days as "termsDays"
     from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
     where s.shop_id = $shopId and s.id = any ($storeIds::uuid[])
     order by s.number, s.id
     for no key update of s`,
    { shopId: context.shopId, storeIds: [...claimed.keys()] },
  );
  return stores.map((store) => ({ ...store, rowId: claimed.get(store.id) as string }));
}

async function lastClosings(
  context: Context,
  storeIds: readonly string[],
): Promise<Map<string, number>> {
  const found = await rows<{ storeId: string; closing: number }>(
    `select l.store_id as "storeId", l.closing
     from unnest($storeIds::uuid[]) as wanted (store_id)
     cross join lateral (
       select store_id, closing from statements s
       where s.shop_id = $shopId and s.store_id = wanted.store_id
       order by month desc, revision desc limit 1
     ) l`,
    { shopId: context.shopId, storeIds },
  );
  return new Map(found.map(({ storeId, closing }) => [storeId, closing]));
}
