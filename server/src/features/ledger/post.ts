import { balanced, type DocumentKind, type Posting } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { write } from '../../core/database/tenancy';

export interface PostedDocument {
  kind: DocumentKind;
  id: string;
  clientId: string;
  /** Trade day in the shop's zone. */
  postedOn: string;
  postings: readonly Posting[];
}

/**
 * Writes a document's entries in the open tenant transaction. They must sum to zero, and a document
 * is posted once: the database refuses the second time. A document that comes to nothing (all at no
 * charge) has no entries.
 */
export function postDocument(
  context: Pick<Context, 'shopId'>,
  document: PostedDocument,
): Promise<void> {
  return postDocuments(context, [document]);
}

/** The same for many documents, with one statement. */
export async function postDocuments(
  context: Pick<Context, 'shopId'>,
  documents: readonly PostedDocument[],
): Promise<void> {
  const entries = documents.flatMap((document) =>
    balanced(document).postings.map((posting, index) => ({
      id: uuid(),
      document_kind: document.kind,
      document_id: document.id,
      line_no: index + 1,
      account: posting.account,
      client_id: document.clientId,
      store_id: posting.storeId,
      amount: posting.amount,
      posted_on: document.postedOn,
    })),
  );
  if (entries.length === 0) return;
  await write(
    `insert into entries
       (shop_id, id, document_kind, document_id, line_no, account, client_id, store_id, amount, posted_on)
     select $shopId, e.id, e.document_kind, e.document_id, e.line_no, e.account, e.client_id,
       e.store_id, e.amount, e.posted_on
     from jsonb_to_recordset($entries::jsonb) as e (id uuid, document_kind text, document_id uuid,
       line_no integer, account text, client_id uuid, store_id uuid, amount bigint, posted_on date)`,
    { shopId: context.shopId, entries: JSON.stringify(entries) },
  );
}
