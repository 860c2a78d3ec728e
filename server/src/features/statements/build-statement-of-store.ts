import { createHash } from 'node:crypto';
import {
  type IsoDate,
  type Month,
  agreesWith,
  buildStatement,
  canonicalJson,
  feePostings,
  lateChargePostings,
  monthBounds,
  statementPostings,
} from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type ShopFacts } from '../../core/shop-facts';
import { postDocument } from '../ledger/post';
import { applyCredits } from '../receivables/apply-credits';
import { statementName } from './document-names';
import { dueDocuments } from './due-documents';
import { type FeeDue, feesDue } from './fees-due';
import { type StoredSnapshot } from './stored-snapshot';

/** What is the same for every store of a run. */
export interface RunFacts {
  id: string;
  month: Month;
  revision: number;
  /** The day all its statements are dated, whenever they come to be built. */
  issuedOn: IsoDate;
  /** Months it takes in: usually one, more when some were left out. */
  months: Month[];
}

interface StoreRow {
  id: string;
  name: string;
  address: string;
  clientId: string;
  clientName: string;
  termsDays: number | null;
}

/**
 * Builds, posts and numbers one store's statement, in one transaction: either all of it is there, or
 * nothing. A store that another attempt has done, or is just doing, is passed over.
 *
 * @returns the statement's id, or undefined when there was nothing to do
 */
export function buildStatementOfStore(
  context: Context,
  shop: ShopFacts,
  run: RunFacts,
  storeId: string,
): Promise<string | undefined> {
  return withTenant(context, async () => {
    const mine = await claimStore(context, run, storeId);
    if (!mine) return undefined;
    const store = await lockStore(context, storeId);
    const { lastDay } = monthBounds(run.month, shop.zone);
    await makeFees(context, shop, run, storeId);
    const previous = await lastClosing(context, storeId);
    const { visits, ...documents } = await dueDocuments(context, shop, storeId, lastDay);
    const number = await nextNumber(context, 'statement');
    const snapshot = buildStatement({
      store: {
        id: store.id,
        name: store.name,
        clientName: store.clientName,
        address: store.address.split('\n').filter((line) => line.trim() !== ''),
      },
      period: run.month,
      opening: previous ?? 0,
      ...documents,
      creditNotes: [],
      terms: {
        number: statementName(number),
        currency: shop.currency,
        date: run.issuedOn,
        days: store.termsDays ?? shop.termsDays,
      },
    });
    if (!agreesWith(snapshot, previous === undefined ? undefined : { closing: previous })) {
      throw new RangeError('It does not open with what the last statement closed with');
    }
    const id = uuid();
    await keep(context, { id, number, run, store, snapshot: { ...snapshot, visits } });
    await write(
      `update statement_run_stores set state = 'built', statement_id = $id, last_error = null
       where shop_id = $shopId and id = $mine`,
      { shopId: context.shopId, id, mine: mine.id },
    );
    return id;
  });
}

/** The store's row of the run, held; nothing when it is done, being done, or the run is held. */
function claimStore(context: Context, run: RunFacts, storeId: string) {
  return row<{ id: string }>(
    `select s.id from statement_run_stores s
     where s.shop_id = $shopId and s.run_id = $runId and s.store_id = $storeId
       and s.state = 'waiting'
       and exists (select 1 from statement_runs r
         where r.shop_id = s.shop_id and r.id = s.run_id and r.state = 'building')
     for update of s skip locked`,
    { shopId: context.shopId, runId: run.id, storeId },
  );
}

/** Payments of the store take turns with its statement on the store's row. */
async function lockStore(context: Context, storeId: string): Promise<StoreRow> {
  const store = await row<StoreRow>(
    `select s.id, s.name, s.address, s.client_id as "clientId", c.name as "clientName",
       c.terms_days as "termsDays"
     from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
     where s.shop_id = $shopId and s.id = $storeId
     for no key update of s`,
    { shopId: context.shopId, storeId },
  );
  if (!store) throw new Error('The store of a run is gone');
  return store;
}

async function lastClosing(context: Context, storeId: string): Promise<number | undefined> {
  const last = await row<{ closing: number }>(
    `select closing from statements where shop_id = $shopId and store_id = $storeId
     order by month desc, revision desc limit 1`,
    { shopId: context.shopId, storeId },
  );
  return last?.closing;
}

async function makeFees(
  context: Context,
  shop: ShopFacts,
  run: RunFacts,
  storeId: string,
): Promise<void> {
  for (const fee of await feesDue(context, shop, run.months, [storeId])) {
    const [made] = await write<{ id: string }>(
      `insert into fees (shop_id, id, client_id, store_id, contract_id, kind, month, words, net,
         tax_basis_points, tax, total, natural_key)
       values ($shopId, $id, $clientId, $storeId, $contractId, $kind, $month, $words, $net,
         $taxBasisPoints, $tax, $total, $naturalKey)
       on conflict (shop_id, natural_key) do nothing returning id`,
      { ...fee, shopId: context.shopId, id: uuid() },
    );
    if (made) await postFee(context, made.id, fee);
  }
}

function postFee(context: Context, id: string, fee: FeeDue): Promise<void> {
  const { storeId, clientId, net: charged, tax } = fee;
  return postDocument(context, {
    kind: fee.kind,
    id,
    clientId,
    postedOn: fee.date,
    postings:
      fee.kind === 'fee'
        ? feePostings({ storeId, charged, tax })
        : lateChargePostings({ storeId, charged, tax }),
  });
}

async function keep(
  context: Context,
  made: { id: string; number: number; run: RunFacts; store: StoreRow; snapshot: StoredSnapshot },
): Promise<void> {
  const { id, number, run, store, snapshot } = made;
  const { sums } = snapshot;
  const text = canonicalJson(snapshot);
  await write(
    `insert into statements (shop_id, id, client_id, store_id, run_id, month, revision, number,
       issued_on, due_on, currency, opening, charged, tax, paid, borne_by_shop, closing, reference,
       snapshot, sha256)
     values ($shopId, $id, $clientId, $storeId, $runId, $month, $revision, $number, $issuedOn,
       $dueOn, $currency, $opening, $charged, $tax, $paid, $borneByShop, $closing, $reference,
       $snapshot::jsonb, $sha256)`,
    {
      shopId: context.shopId,
      id,
      clientId: store.clientId,
      storeId: store.id,
      runId: run.id,
      month: run.month,
      revision: run.revision,
      number,
      issuedOn: snapshot.date,
      dueOn: snapshot.dueOn,
      currency: snapshot.currency,
      opening: snapshot.opening,
      charged: sums.charged,
      tax: sums.tax,
      paid: sums.paid + sums.credited,
      borneByShop: sums.borneByShop,
      closing: snapshot.closing,
      reference: snapshot.reference,
      snapshot: text,
      sha256: createHash('sha256').update(text).digest('hex'),
    },
  );
  await write(
    `insert into statement_documents (shop_id, statement_id, client_id, document_kind, document_id)
     select $shopId, $id, $clientId, d.kind, d.id
     from jsonb_to_recordset($documents::jsonb) as d (kind text, id uuid)`,
    {
      shopId: context.shopId,
      id,
      clientId: store.clientId,
      documents: JSON.stringify(snapshot.lines.map((line) => ({ kind: line.kind, id: line.id }))),
    },
  );
  await postDocument(context, {
    kind: 'statement',
    id,
    clientId: store.clientId,
    postedOn: snapshot.date,
    postings: statementPostings({ storeId: store.id, amount: sums.total }),
  });
  await applyCredits(context, {
    id,
    storeId: store.id,
    clientId: store.clientId,
    open: sums.total,
  });
}
