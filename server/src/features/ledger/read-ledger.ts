import {
  type AccountCode,
  accountCodes,
  accountGroups,
  balanced,
  type DocumentKind,
  journalText,
  type LedgerDocument,
  type Posting,
  tradeDayOf,
} from '@lib/domain';
import { type Context } from '../../core/context';
import { type Bind, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf, RawReply } from '../../core/http/route';
import { sendPiece } from '../../core/http/send-piece';
import { page } from '../../core/lists/keyset';
import { shopFacts } from '../../core/shop-facts';

type Entry = AnswerOf<'ledger.entries'>['items'][number];

export function trialBalanceOn(
  context: Context,
  query: InputOf<'ledger.trialBalance'>['query'],
): Promise<AnswerOf<'ledger.trialBalance'>> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    const on = query.on ?? tradeDayOf(context.now, shop.zone);
    const sums = await rows<{ account: AccountCode; debit: number; credit: number }>(
      `select account, coalesce(sum(amount) filter (where amount > 0), 0)::bigint as debit,
         coalesce(-sum(amount) filter (where amount < 0), 0)::bigint as credit
       from entries
       where shop_id = $shopId and posted_on <= $on
         and ($storeId::uuid is null or store_id = $storeId::uuid)
       group by account`,
      { shopId: context.shopId, on, storeId: query.storeId ?? null },
    );
    const accounts = accountCodes.map((account) => {
      const { debit, credit } = sums.find((sum) => sum.account === account) ?? {
        debit: 0,
        credit: 0,
      };
      return { account, group: accountGroups[account], debit, credit, balance: debit - credit };
    });
    const total = accounts.reduce((sum, { balance }) => sum + balance, 0);
    return { on, currency: shop.currency, accounts, total };
  });
}

interface EntryRow extends Omit<Entry, 'at'> {
  at: Date;
}

export function listEntries(
  context: Context,
  query: InputOf<'ledger.entries'>['query'],
): Promise<AnswerOf<'ledger.entries'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = ['e.shop_id = $shopId'];
    const filter = (value: string | undefined, name: string, condition: string) => {
      if (value === undefined) return;
      bind[name] = value;
      where.push(condition);
    };
    filter(query.from, 'from', 'e.posted_on >= $from');
    filter(query.to, 'to', 'e.posted_on <= $to');
    filter(query.account, 'account', 'e.account = $account');
    filter(query.documentKind, 'documentKind', 'e.document_kind = $documentKind');
    filter(query.documentId, 'documentId', 'e.document_id = $documentId');
    filter(query.storeId, 'storeId', 'e.store_id = $storeId');
    filter(query.clientId, 'clientId', 'e.client_id = $clientId');
    return page<EntryRow, Entry>(
      {
        select: `select e.id, e.posted_on as "postedOn", e.at, e.document_kind as "documentKind",
          e.document_id as "documentId", e.account, e.amount, e.store_id as "storeId",
          s.name as "storeName", e.client_id as "clientId"
          from entries e left join stores s on s.shop_id = e.shop_id and s.id = e.store_id`,
        from: 'entries e',
        where,
        bind,
        sort: { column: 'e.posted_on', type: 'date', descending: query.sort === '-postedOn' },
        id: 'e.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (entry) => ({
        id: entry.id,
        postedOn: entry.postedOn,
        at: entry.at.toISOString(),
        documentKind: entry.documentKind,
        documentId: entry.documentId,
        account: entry.account,
        amount: entry.amount,
        storeId: entry.storeId,
        storeName: entry.storeName,
        clientId: entry.clientId,
      }),
    );
  });
}

interface JournalRow {
  id: string;
  kind: DocumentKind;
  date: string;
  name: string;
  account: AccountCode;
  storeId: string;
  storeName: string;
  amount: number;
}

/** Where a piece ended. A ticket and what the shop bore of it share an id and a day. */
type LastDocument = Pick<JournalRow, 'date' | 'id' | 'kind'>;

/** Documents read at once: a year's books are never in memory whole. */
const chunk = 2000;

/** The books of a span as plain text that other accounting programs read. */
export async function journalFile(
  context: Context,
  span: InputOf<'ledger.journal'>['query'],
): Promise<RawReply> {
  const shop = await withTenant(context, () => shopFacts(context));
  return new RawReply(async (response) => {
    response.status(200).set({
      'Content-Type': 'text/plain; charset=utf-8',
      'Content-Disposition': 'attachment; filename="journal.txt"',
    });
    for (let after: LastDocument | undefined; ;) {
      const found = await withTenant(context, () => journalRows(context, span, after));
      const documents = documentsOf(found);
      if (documents.length === 0) break;
      const names = new Map(found.map((line) => [line.storeId, line.storeName]));
      const storeName = (id: string) => names.get(id) ?? id;
      const text = journalText(documents, { currency: shop.currency, storeName });
      const goesOn = await sendPiece(response, `${text}\n`);
      const last = found.at(-1);
      if (!last || documents.length < chunk || !goesOn) break;
      after = last;
    }
    response.end();
  });
}

function journalRows(
  context: Context,
  span: InputOf<'ledger.journal'>['query'],
  after: LastDocument | undefined,
): Promise<JournalRow[]> {
  return rows<JournalRow>(
    `select d.document_id as id, d.document_kind as kind, d.posted_on as date,
       coalesce(
         (select 'T-' || lpad(number::text, 4, '0') from tickets
          where shop_id = $shopId and d.document_kind = 'ticket' and id = d.document_id),
         (select 'S-' || lpad(number::text, 4, '0') from statements
          where shop_id = $shopId and d.document_kind = 'statement' and id = d.document_id),
         (select 'P-' || lpad(number::text, 4, '0') from payments
          where shop_id = $shopId and d.document_kind = 'payment' and id = d.document_id),
         left(d.document_id::text, 13)) as name,
       e.account, e.store_id as "storeId", s.name as "storeName", e.amount
     from (
       select distinct document_kind, document_id, posted_on from entries
       where shop_id = $shopId
         and ($from::date is null or posted_on >= $from::date)
         and ($to::date is null or posted_on <= $to::date)
         and ($afterDay::date is null or (posted_on, document_id, document_kind)
           > ($afterDay::date, $afterId::uuid, $afterKind))
       order by posted_on, document_id, document_kind limit ${chunk}
     ) d
     join entries e on e.shop_id = $shopId and e.document_kind = d.document_kind
       and e.document_id = d.document_id
     left join stores s on s.shop_id = $shopId and s.id = e.store_id
     order by d.posted_on, d.document_id, d.document_kind, e.line_no`,
    {
      shopId: context.shopId,
      from: span.from ?? null,
      to: span.to ?? null,
      afterDay: after?.date ?? null,
      afterId: after?.id ?? null,
      afterKind: after?.kind ?? null,
    },
  );
}

function documentsOf(lines: readonly JournalRow[]): LedgerDocument[] {
  const documents = new Map<string, LedgerDocument & { postings: Posting[] }>();
  for (const { id, kind, date, name, account, storeId, amount } of lines) {
    const key = `${kind} ${id}`;
    const document = documents.get(key) ?? { kind, date, reference: name, postings: [] };
    document.postings.push({ account, storeId, amount });
    documents.set(key, document);
  }
  return [...documents.values()].map((document) => balanced(document));
}
