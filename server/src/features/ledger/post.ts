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
export async function postDocument(
  context: Pick<Context, 'shopId'>,
  document: PostedDocument,
): Promise<void> {
  const { postings } = balanced(document);
  if (postings.length === 0) return;
  const entries = postings.map((posting, index) => ({
    id: uuid(),
    line_no: index + 1,
    account: posting.account,
    store_id: posting.storeId,
    amount: posting.amount,
  }));
  await write(
    `insert into entries
       (shop_id, id, document_kind, document_id, line_no, account, client_id, store_id, amount, posted_on)
     select $shopId, e.id, $kind, $documentId, e.line_no, e.account, $clientId, e.store_id, e.amount, $postedOn
     from jsonb_to_recordset($entries::jsonb)
       as e (id uuid, line_no integer, account text, store_id uuid, amount bigint)`,
    {
      shopId: context.shopId,
      kind: document.kind,
      documentId: document.id,
      clientId: document.clientId,
      postedOn: document.postedOn,
      entries: JSON.stringify(entries),
    },
  );
}
