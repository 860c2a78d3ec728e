import { createHash } from 'node:crypto';
import { canonicalJson, statementPostings } from '@lib/domain';
import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';
import { postDocuments } from '../ledger/post';
import { applyCredits } from '../receivables/apply-credits';
import { type BuiltStatement, type RunFacts } from './built-statement';

/** Writes down statements just built: what they say, what stands on them, and what is owed by them. */
export async function keepStatements(
  context: Context,
  run: RunFacts,
  built: readonly BuiltStatement[],
): Promise<void> {
  await insertStatements(context, run, built);
  await insertDocuments(context, built);
  await postDocuments(
    context,
    built.map(({ id, store, snapshot }) => ({
      kind: 'statement',
      id,
      clientId: store.clientId,
      postedOn: snapshot.date,
      postings: statementPostings({ storeId: store.id, amount: snapshot.sums.total }),
    })),
  );
  await applyCredits(
    context,
    built.map(({ id, store, snapshot }) => ({
      id,
      storeId: store.id,
      clientId: store.clientId,
      open: snapshot.sums.total,
    })),
  );
  await write(
    `update statement_run_stores r
     set state = 'built', statement_id = b.statement_id, last_error = null
     from jsonb_to_recordset($built::jsonb) as b (id uuid, statement_id uuid)
     where r.shop_id = $shopId and r.id = b.id`,
    {
      shopId: context.shopId,
      built: JSON.stringify(built.map(({ id, store }) => ({ id: store.rowId, statement_id: id }))),
    },
  );
}

async function insertStatements(
  context: Context,
  run: RunFacts,
  built: readonly BuiltStatement[],
): Promise<void> {
  await write(
    `insert into statements (shop_id, id, client_id, store_id, run_id, month, revision, number,
       issued_on, due_on, currency, opening, charged, tax, paid, borne_by_shop, closing, reference,
       snapshot, sha256)
     select $shopId, b.id, b.client_id, b.store_id, $runId, $month, $revision, b.number,
       b.issued_on, b.due_on, b.currency, b.opening, b.charged, b.tax, b.paid, b.borne_by_shop,
       b.closing, b.reference, b.snapshot, b.sha256
     from jsonb_to_recordset($built::jsonb) as b (id uuid, client_id uuid, store_id uuid,
       number bigint, issued_on date, due_on date, currency text, opening bigint, charged bigint,
       tax bigint, paid bigint, borne_by_shop bigint, closing bigint, reference text,
       snapshot jsonb, sha256 text)`,
    {
      shopId: context.shopId,
      runId: run.id,
      month: run.month,
      revision: run.revision,
      built: JSON.stringify(built.map(columnsOf)),
    },
  );
}

function columnsOf({ id, number, store, snapshot }: BuiltStatement) {
  const { sums } = snapshot;
  return {
    id,
    client_id: store.clientId,
    store_id: store.id,
    number,
    issued_on: snapshot.date,
    due_on: snapshot.dueOn,
    currency: snapshot.currency,
    opening: snapshot.opening,
    charged: sums.charged,
    tax: sums.tax,
    paid: sums.paid + sums.credited,
    borne_by_shop: sums.borneByShop,
    closing: snapshot.closing,
    reference: snapshot.reference,
    snapshot,
    sha256: createHash('sha256').update(canonicalJson(snapshot)).digest('hex'),
  };
}

/** A document stands on one statement only: the database refuses it on a second. */
async function insertDocuments(context: Context, built: readonly BuiltStatement[]): Promise<void> {
  const documents = built.flatMap(({ id, store, snapshot }) =>
    snapshot.lines.map((line) => ({
      statement_id: id,
      client_id: store.clientId,
      kind: line.kind,
      id: line.id,
    })),
  );
  if (documents.length === 0) return;
  await write(
    `insert into statement_documents (shop_id, statement_id, client_id, document_kind, document_id)
     select $shopId, d.statement_id, d.client_id, d.kind, d.id
     from jsonb_to_recordset($documents::jsonb)
       as d (statement_id uuid, client_id uuid, kind text, id uuid)`,
    { shopId: context.shopId, documents: JSON.stringify(documents) },
  );
}
