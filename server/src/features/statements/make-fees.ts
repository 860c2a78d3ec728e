import { type Month, feePostings, lateChargePostings } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';
import { type ShopFacts } from '../../core/shop-facts';
import { type PostedDocument, postDocuments } from '../ledger/post';
import { type FeeDue, feesDue } from './fees-due';

/** Makes and posts the fees and late charges of some stores that are due and not made yet. */
export async function makeFees(
  context: Context,
  shop: ShopFacts,
  months: readonly Month[],
  storeIds: readonly string[],
): Promise<void> {
  const due = (await feesDue(context, shop, months, storeIds)).map((fee) => ({
    ...fee,
    id: uuid(),
  }));
  if (due.length === 0) return;
  const made = await write<{ id: string }>(
    `insert into fees (shop_id, id, client_id, store_id, contract_id, kind, month, words, net,
       tax_basis_points, tax, total, natural_key)
     select $shopId, f.id, f."clientId", f."storeId", f."contractId", f.kind, f.month, f.words,
       f.net, f."taxBasisPoints", f.tax, f.total, f."naturalKey"
     from jsonb_to_recordset($due::jsonb) as f (id uuid, "clientId" uuid, "storeId" uuid,
       "contractId" uuid, kind text, month text, words text, net bigint,
       "taxBasisPoints" double precision, tax bigint, total bigint, "naturalKey" text)
     on conflict (shop_id, natural_key) do nothing returning id`,
    { shopId: context.shopId, due: JSON.stringify(due) },
  );
  const ids = new Set(made.map(({ id }) => id));
  await postDocuments(context, due.filter(({ id }) => ids.has(id)).map(posted));
}

function posted(fee: FeeDue & { id: string }): PostedDocument {
  const { id, kind, clientId, storeId, date: postedOn, net: charged, tax } = fee;
  const postings =
    kind === 'fee'
      ? feePostings({ storeId, charged, tax })
      : lateChargePostings({ storeId, charged, tax });
  return { kind, id, clientId, postedOn, postings };
}
